import { endpoint } from '$lib/server/http/endpoint';
import { bookOperations } from '$lib/server/http/operations/books';
import { changeCoefficient } from '$lib/server/services/book-changes';

export const PUT = endpoint(bookOperations.change, ({ person, params, body }) =>
	changeCoefficient(person, params.bookId, params.coefficient, body)
);
