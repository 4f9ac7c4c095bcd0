import { endpoint } from '$lib/server/http/endpoint';
import { fitOperations } from '$lib/server/http/operations/fits';
import { draftFittedBook } from '$lib/server/services/fit-books';

export const POST = endpoint(fitOperations.draft, ({ person, params, body }) =>
	draftFittedBook(person, params.fitId, body)
);
