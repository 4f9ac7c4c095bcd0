import { endpoint } from '$lib/server/http/endpoint';
import { letterOperations } from '$lib/server/http/operations/letters';
import { listSentLetters } from '$lib/server/services/sent-letters';

export const GET = endpoint(letterOperations.list, async ({ person, params }) => ({
	rows: await listSentLetters(person, params.jobId)
}));
