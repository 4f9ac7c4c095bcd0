import { endpoint } from '$lib/server/http/endpoint';
import { peopleOperations } from '$lib/server/http/operations/people';
import { changeRole } from '$lib/server/services/people';

export const PUT = endpoint(peopleOperations.changeRole, ({ person, params, body }) =>
	changeRole(person, params.personId, body)
);
