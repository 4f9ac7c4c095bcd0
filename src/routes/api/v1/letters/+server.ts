import { endpoint } from '$lib/server/http/endpoint';
import { letterOperations } from '$lib/server/http/operations/letters';
import { listFailedLetters } from '$lib/server/services/sent-letters';

export const GET = endpoint(letterOperations.listFailed, async ({ person }) => ({
	rows: await listFailedLetters(person)
}));
