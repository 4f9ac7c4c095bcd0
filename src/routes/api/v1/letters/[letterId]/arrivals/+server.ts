import { endpoint } from '$lib/server/http/endpoint';
import { letterOperations } from '$lib/server/http/operations/letters';
import { noteLetterArrived } from '$lib/server/services/sent-letters';

export const POST = endpoint(letterOperations.arrived, ({ person, params }) =>
	noteLetterArrived(person, params.letterId)
);
