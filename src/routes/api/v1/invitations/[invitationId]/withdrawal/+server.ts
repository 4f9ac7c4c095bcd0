import { endpoint } from '$lib/server/http/endpoint';
import { peopleOperations } from '$lib/server/http/operations/people';
import { withdrawInvitation } from '$lib/server/services/invitations';

export const POST = endpoint(peopleOperations.withdraw, ({ person, params }) =>
	withdrawInvitation(person, params.invitationId)
);
