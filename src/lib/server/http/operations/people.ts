import { z } from 'zod';
import { versionSchema } from '$lib/schemas/fields';
import {
	invitationInputSchema,
	invitationParams,
	invitationRowSchema,
	peopleSchema,
	personParams,
	personRowSchema,
	roleChangeSchema
} from '$lib/schemas/people';
import { defineOperation } from '../operation';

const seen = z.object({ version: versionSchema });

export const peopleOperations = {
	list: defineOperation({
		id: 'listPeople',
		method: 'GET',
		path: '/api/v1/people',
		action: 'people.read',
		summary: 'Who works in the shop, who worked there, and who was asked to join.',
		answer: peopleSchema,
		status: 200
	}),
	changeRole: defineOperation({
		id: 'changeRole',
		method: 'PUT',
		path: '/api/v1/people/[personId]/role',
		action: 'people.write',
		summary: 'Gives a person another role, never oneself; their sessions end.',
		params: personParams,
		body: roleChangeSchema,
		answer: personRowSchema,
		status: 200
	}),
	leave: defineOperation({
		id: 'leavePerson',
		method: 'POST',
		path: '/api/v1/people/[personId]/departure',
		action: 'people.write',
		summary: 'Somebody leaves: their sessions end at once, and what they did keeps their name.',
		params: personParams,
		body: seen,
		answer: personRowSchema,
		status: 200
	}),
	comeBack: defineOperation({
		id: 'bringBackPerson',
		method: 'POST',
		path: '/api/v1/people/[personId]/return',
		action: 'people.write',
		summary: 'Somebody who had left is here again, as what they were.',
		params: personParams,
		body: seen,
		answer: personRowSchema,
		status: 200
	}),
	resetFactor: defineOperation({
		id: 'resetSecondFactor',
		method: 'DELETE',
		path: '/api/v1/people/[personId]/second-factor',
		action: 'people.write',
		summary: 'Takes the second factor from somebody who has lost it; a letter tells them.',
		params: personParams,
		answer: personRowSchema,
		status: 200
	}),
	invite: defineOperation({
		id: 'invitePerson',
		method: 'POST',
		path: '/api/v1/invitations',
		action: 'people.write',
		summary: 'Asks somebody to join, by a letter with a link that works once within 72 hours.',
		body: invitationInputSchema,
		answer: invitationRowSchema,
		status: 201
	}),
	inviteAgain: defineOperation({
		id: 'inviteAgain',
		method: 'POST',
		path: '/api/v1/invitations/[invitationId]/letter',
		action: 'people.write',
		summary: 'Sends an invitation once more; the link of the letter before stops working.',
		params: invitationParams,
		answer: invitationRowSchema,
		status: 200
	}),
	withdraw: defineOperation({
		id: 'withdrawInvitation',
		method: 'POST',
		path: '/api/v1/invitations/[invitationId]/withdrawal',
		action: 'people.write',
		summary: 'Takes an invitation back: its link opens nothing any more.',
		params: invitationParams,
		answer: invitationRowSchema,
		status: 200
	})
};
