import { endpoint } from '$lib/server/http/endpoint';
import { peopleOperations } from '$lib/server/http/operations/people';
import { invite } from '$lib/server/services/invitations';

export const POST = endpoint(peopleOperations.invite, ({ person, body }) => invite(person, body));
