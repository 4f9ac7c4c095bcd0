import type { CoefficientBook } from '../db/models';
import { AppError } from '../errors';
import { withCoefficients } from './books';

/**
 * With values that contradict each other nothing can be assessed. A draft may hold them, because both of a pair are changed
 * one after the other; a book that comes closer to being used may not.
 */
export async function requireConsistent(book: CoefficientBook): Promise<void> {
	const { contradictions } = await withCoefficients(book);
	if (contradictions.length === 0) return;
	const said = contradictions.map(({ message }) => message).join(' ');
	throw new AppError(
		'conflict',
		`Book ${book.number} contradicts itself: with it nothing could be assessed. ${said}`,
		contradictions.map(({ paths, value, limit, message }) => ({
			path: paths[0] ?? '',
			...{ code: 'inconsistent', value, limit, message }
		}))
	);
}
