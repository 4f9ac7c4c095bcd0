import type { BookView } from '$lib/schemas/books';
import type { FittedDraft } from '$lib/schemas/fits';
import type { SignedInPerson } from '$lib/schemas/people';
import { isLearnt, sayNoBook } from '$lib/format/fits';
import { formatNumber } from '$lib/format/numbers';
import type { CoefficientEstimate } from '$lib/thermal/fit';
import { Coefficient, CoefficientBook, Fit, Trace } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError } from '../errors';
import { allow } from '../policies';
import { recordBy } from './audit';
import { draftBook } from './book-changes';
import { getBook } from './books';
import { scopeOfFit } from './fit-scope';
import { findFit } from './fits';

const SIGNIFICANT = 4;
const round = (value: number): number => Number(value.toPrecision(SIGNIFICANT));

function sayFigure(value: number): string {
	const rounded = round(value);
	const decimals = Math.max(0, SIGNIFICANT - 1 - Math.floor(Math.log10(Math.abs(rounded) || 1)));
	return formatNumber(rounded, Math.min(decimals, 6))
		.replace(/(\.\d*?)0+$/, '$1')
		.replace(/\.$/, '');
}

/** Where a fitted value comes from: the fit, its traces, and between what it lies. */
function sourceOf({ id, inputs }: Fit, { low, high, unit }: CoefficientEstimate): string {
	const ids = inputs.traces.map(({ traceId }) => traceId).join(', ');
	const traces = inputs.traces.length === 1 ? `trace ${ids}` : `traces ${ids}`;
	const of = unit === '-' ? '' : ` ${unit}`;
	return `Fit ${id} to ${traces}: nine chances in ten between ${sayFigure(low)} and ${sayFigure(high)}${of}.`;
}

/** What was made up says nothing of a battery: no book is made from it, not even one to try. */
async function refuseSynthetic({ isSynthetic, inputs }: Fit): Promise<void> {
	const ids = inputs.traces.map(({ traceId }) => traceId);
	const nowSynthetic = await Trace.count({ where: { id: ids, isSynthetic: true } });
	if (!isSynthetic && nowSynthetic === 0) return;
	throw new AppError(
		'conflict',
		'A trace of this fit is synthetic: its figures were made up, not measured. No coefficient book is made from it.'
	);
}

/** Begins a draft with the values of the book that the fit began from, and the fitted ones in their places, as far as something was learnt of them. */
export async function draftFittedBook(
	person: SignedInPerson,
	fitId: number,
	words: FittedDraft
): Promise<BookView> {
	allow(person, 'books.write');
	const fit = await findFit(person, fitId);
	const { result, bookId: fromBookId } = fit;
	if (fit.state !== 'done' || !result) {
		throw new AppError('conflict', 'This fit has not come to values that a book could have.');
	}
	await refuseSynthetic(fit);
	const noBook = sayNoBook(result);
	if (noBook) throw new AppError('conflict', noBook);
	const learnt = result.estimates.filter(({ spreadLeft }) => isLearnt(spreadLeft));
	if (learnt.length === 0) {
		throw new AppError(
			'conflict',
			'This fit has learnt nothing of any coefficient: a book would have nothing new.'
		);
	}
	const from = (await CoefficientBook.findByPk(fromBookId))!;
	const traceIds = fit.inputs.traces.map(({ traceId }) => traceId);
	const scope = await scopeOfFit(person, traceIds, from);
	return inTransaction(async (transaction) => {
		const book = await draftBook(person, { fromBookId, ...words, ...scope });
		for (const estimate of learnt) {
			const { group: fieldGroup, key: fieldKey } = estimate;
			const fitted = {
				value: round(estimate.value),
				origin: 'fitted',
				source: sourceOf(fit, estimate)
			} as const;
			const where = { bookId: book.id, fieldGroup, fieldKey };
			await Coefficient.update({ ...fitted, fitId }, { where, transaction });
		}
		const subject = { type: 'fit', id: fitId };
		await recordBy(person, 'fit.drafted', subject, transaction, { book: book.number });
		return getBook(person, book.id);
	});
}
