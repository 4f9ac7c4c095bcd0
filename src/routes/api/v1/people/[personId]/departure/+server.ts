import { endpoint } from '$lib/server/http/endpoint';
import { peopleOperations } from '$lib/server/http/operations/people';
import { leave } from '$lib/server/services/people';

export const POST = endpoint(peopleOperations.leave, ({ person, params, body }) =>
	leave(person, params.personId, body.version)
);
