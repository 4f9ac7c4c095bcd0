import { endpoint } from '$lib/server/http/endpoint';
import { peopleOperations } from '$lib/server/http/operations/people';
import { resetFactor } from '$lib/server/services/second-factor';

export const DELETE = endpoint(peopleOperations.resetFactor, ({ person, params }) =>
	resetFactor(person, params.personId)
);
