import {
	writeCoefficientPath,
	type BookComparison,
	type BookRow,
	type BookView,
	type CoefficientPair,
	type CoefficientView,
	type ContradictionView
} from '$lib/schemas/books';
import { formatCoefficient } from '$lib/format/books';
import type { Contradiction } from '$lib/thermal';
import type { Coefficient, CoefficientBook } from '../db/models';

/** Names of people by their number. */
export type NameOf = (personId: number | null | undefined) => string;

export function presentBookRow(book: CoefficientBook, nameOf: NameOf): BookRow {
	const { id, number, name, state, note, engineLayout, positionKind, version } = book;
	const { createdAt, madeBy, inForceBy, inForceAt } = book;
	return {
		...{ id, number, name, state, note, engineLayout, positionKind, version },
		madeBy: nameOf(madeBy),
		madeById: madeBy ?? null,
		inForceBy: nameOf(inForceBy),
		inForceAt: inForceAt?.toISOString() ?? null,
		createdAt: createdAt.toISOString()
	};
}

/** A coefficient in words: what the thermal model says of its field stands beside the book's value. */
export function presentCoefficient(
	{ fieldGroup, fieldKey, value, unit, origin, source, fitId }: Coefficient,
	field: { meaning: string; default: number | null } | undefined
): CoefficientView {
	return {
		group: fieldGroup,
		key: fieldKey,
		...{ value, unit, origin, source },
		fitId: fitId ?? null,
		meaning: field?.meaning ?? '',
		default: field?.default ?? null
	};
}

/** A contradiction with the names that its coefficients have in the book. */
export function presentContradiction(
	{ path, against, value, limit }: Contradiction,
	coefficients: readonly CoefficientView[]
): ContradictionView {
	const concerned = [path, against].map((each) =>
		coefficients.find((coefficient) => writeCoefficientPath(coefficient) === each)
	);
	const [own] = concerned;
	const name = own ? `${own.meaning.replace(/\.$/, '')} (${path})` : path;
	return {
		paths: concerned.filter((each) => each !== undefined).map(writeCoefficientPath),
		...{ value: Number(value), limit },
		message: `${name} is ${formatCoefficient(Number(value), own?.unit ?? '-')}: it must be ${limit}.`
	};
}

export function presentBook(
	book: CoefficientBook,
	coefficients: CoefficientView[],
	contradictions: ContradictionView[],
	nameOf: NameOf
): BookView {
	return { ...presentBookRow(book, nameOf), coefficients, contradictions };
}

const isSame = (left: CoefficientView | null, right: CoefficientView | null): boolean =>
	left?.value === right?.value && left?.origin === right?.origin && left?.source === right?.source;

/** Two books side by side: what differs, in the order of the left one. */
export function presentComparison(left: BookView, right: BookView): BookComparison {
	const inLeft = new Map(left.coefficients.map((each) => [writeCoefficientPath(each), each]));
	const inRight = new Map(right.coefficients.map((each) => [writeCoefficientPath(each), each]));
	const pairs = [...new Set([...inLeft.keys(), ...inRight.keys()])].map((path): CoefficientPair => {
		const pair = { left: inLeft.get(path) ?? null, right: inRight.get(path) ?? null };
		const { group, key, meaning, unit } = (pair.left ?? pair.right)!;
		return { group, key, meaning, unit, ...pair };
	});
	const differing = pairs.filter((pair) => !isSame(pair.left, pair.right));
	const { coefficients: _left, ...leftRow } = left;
	const { coefficients: _right, ...rightRow } = right;
	return { left: leftRow, right: rightRow, differing, same: pairs.length - differing.length };
}
