import { endpoint } from '$lib/server/http/endpoint';
import { bookOperations } from '$lib/server/http/operations/books';
import { compareBooks } from '$lib/server/services/book-changes';

export const GET = endpoint(bookOperations.compare, ({ person, params }) =>
	compareBooks(person, params.bookId, params.otherId)
);
