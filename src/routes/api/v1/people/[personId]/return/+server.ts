import { endpoint } from '$lib/server/http/endpoint';
import { peopleOperations } from '$lib/server/http/operations/people';
import { comeBack } from '$lib/server/services/people';

export const POST = endpoint(peopleOperations.comeBack, ({ person, params, body }) =>
	comeBack(person, params.personId, body.version)
);
