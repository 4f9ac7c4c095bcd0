import { endpoint } from '$lib/server/http/endpoint';
import { bookOperations } from '$lib/server/http/operations/books';
import { listBooks } from '$lib/server/services/books';

export const GET = endpoint(bookOperations.list, async ({ person }) => ({ rows: await listBooks(person) }));
