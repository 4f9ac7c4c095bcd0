import type { BookRow, BookView, CoefficientView } from '$lib/schemas/books';
import type { Coefficient, CoefficientBook } from '../db/models';

export function presentBookRow({ id, number, name, state, note, createdAt }: CoefficientBook): BookRow {
	return { id, number, name, state, note, createdAt: createdAt.toISOString() };
}

/** A coefficient in words: what the thermal model says of its field stands beside the book's value. */
export function presentCoefficient(
	{ fieldGroup, fieldKey, value, unit, source }: Coefficient,
	field: { meaning: string; default: number | null } | undefined
): CoefficientView {
	return {
		group: fieldGroup,
		key: fieldKey,
		value,
		unit,
		meaning: field?.meaning ?? '',
		default: field?.default ?? null,
		source
	};
}

export function presentBook(book: CoefficientBook, coefficients: CoefficientView[]): BookView {
	return { ...presentBookRow(book), coefficients };
}
