import { partOf } from '../uncertainty/finish-work';
import { findFit, type FindOptions } from './find-fit';
import { measureErrors, type FitErrors } from './fit-errors';
import type { FitSetup } from './fit-setup';
import { residualsOf, type Noises } from './noise';

/** Errors with the values of before the fit and with those that were fitted. */
export interface ErrorsCompared {
	before: FitErrors;
	after: FitErrors;
}

/** Residuals of some readings of a trace with these coefficients, its start temperatures as first read. */
function testOn(
	setup: FitSetup,
	trace: number,
	which: 'fitted' | 'heldOut',
	values: readonly (number | null)[]
): Float64Array[] {
	const model = setup.models[trace]!;
	const rows = model.predict(
		values,
		model.starts.map(({ mean }) => mean)
	);
	return setup.blocksOf([trace], which).map((block) => residualsOf(block, rows));
}

/** Errors of some readings, with coefficients of their own for each trace. */
export function compareOn(
	setup: FitSetup,
	which: 'fitted' | 'heldOut',
	before: readonly (number | null)[],
	afterOf: (trace: number) => readonly number[]
): ErrorsCompared | null {
	const blocks = setup.all.flatMap((trace) => setup.blocksOf([trace], which));
	const measure = (valuesOf: (trace: number) => readonly (number | null)[]) =>
		measureErrors(
			blocks,
			setup.all.flatMap((trace) => testOn(setup, trace, which, valuesOf(trace)))
		);
	const [old, fitted] = [measure(() => before), measure(afterOf)];
	return old && fitted && { before: old, after: fitted };
}

/**
 * Fits without each trace in turn and holds that fit against the trace that it has not seen.
 *
 * Source: Stone, Cross-validatory choice and assessment of statistical predictions, J. R. Statist. Soc. B 36 (1974) 111.
 *
 * @returns as a generator, yields the share of the work done; null where there is one trace only
 */
export function* leaveEachOut(
	setup: FitSetup,
	options: FindOptions,
	start: readonly number[],
	noises: Noises,
	before: readonly (number | null)[]
): Generator<number, ErrorsCompared | null> {
	const count = setup.all.length;
	if (count < 2) return null;
	const valuesWithout: number[][] = [];
	for (const left of setup.all) {
		const others = setup.all.filter((trace) => trace !== left);
		const problem = setup.problemOf(others);
		const coefficients = start.slice(0, setup.coefficients.length);
		const from = [...coefficients, ...problem.middle().slice(coefficients.length)];
		const found = yield* partOf(findFit(problem, options, from, noises), (share) => (left + share) / count);
		valuesWithout.push(problem.valuesAt(found.parameters));
	}
	return compareOn(setup, 'fitted', before, (trace) => valuesWithout[trace]!);
}
