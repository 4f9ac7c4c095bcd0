import { endpoint } from '$lib/server/http/endpoint';
import { letterOperations } from '$lib/server/http/operations/letters';
import { sendLetterAgain } from '$lib/server/services/sent-letters';

export const POST = endpoint(letterOperations.again, ({ person, params }) =>
	sendLetterAgain(person, params.letterId)
);
