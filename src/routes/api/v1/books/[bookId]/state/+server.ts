import { endpoint } from '$lib/server/http/endpoint';
import { bookOperations } from '$lib/server/http/operations/books';
import { moveBook } from '$lib/server/services/book-changes';

export const PUT = endpoint(bookOperations.move, ({ person, params, body }) =>
	moveBook(person, params.bookId, body)
);
