import { remedyListInputSchema, remedyListSchema } from '$lib/schemas/remedies';
import { defineOperation } from '../operation';

export const remedyOperations = {
	get: defineOperation({
		id: 'getRemedies',
		method: 'GET',
		path: '/api/v1/remedies',
		action: 'remedies.read',
		summary: 'The remedies that are tried for a mount, with what the workshop asks for each.',
		answer: remedyListSchema,
		status: 200
	}),
	update: defineOperation({
		id: 'saveRemedies',
		method: 'PUT',
		path: '/api/v1/remedies',
		action: 'remedies.write',
		summary: 'Keeps what the workshop asks for its remedies, if nobody changed it since it was read.',
		body: remedyListInputSchema,
		answer: remedyListSchema,
		status: 200
	})
};
