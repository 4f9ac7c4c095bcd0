import { endpoint } from '$lib/server/http/endpoint';
import { peopleOperations } from '$lib/server/http/operations/people';
import { inviteAgain } from '$lib/server/services/invitations';

export const POST = endpoint(peopleOperations.inviteAgain, ({ person, params }) =>
	inviteAgain(person, params.invitationId)
);
