import { endpoint } from '$lib/server/http/endpoint';
import { bookOperations } from '$lib/server/http/operations/books';
import { getBook } from '$lib/server/services/books';

export const GET = endpoint(bookOperations.get, ({ person, params }) => getBook(person, params.bookId));
