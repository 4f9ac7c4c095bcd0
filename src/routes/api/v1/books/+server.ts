import { endpoint } from '$lib/server/http/endpoint';
import { bookOperations } from '$lib/server/http/operations/books';
import { draftBook } from '$lib/server/services/book-changes';
import { listBooks } from '$lib/server/services/books';

export const GET = endpoint(bookOperations.list, async ({ person }) => ({ rows: await listBooks(person) }));

export const POST = endpoint(bookOperations.draft, ({ person, body }) => draftBook(person, body));
