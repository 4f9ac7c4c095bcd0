import { z } from 'zod';
import { askErasureSchema, decideErasureSchema, erasureSchema, myErasureSchema } from '$lib/schemas/erasures';
import { idSchema } from '$lib/schemas/fields';
import { defineOperation } from '../operation';

export const erasureOperations = {
	list: defineOperation({
		id: 'listErasures',
		method: 'GET',
		path: '/api/v1/erasures',
		action: 'erasures.decide',
		summary: 'What customers asked to have deleted, and what became of it.',
		answer: z.object({ rows: z.array(erasureSchema) }),
		status: 200
	}),
	decide: defineOperation({
		id: 'decideErasure',
		method: 'POST',
		path: '/api/v1/erasures/[erasureId]/decision',
		action: 'erasures.decide',
		summary:
			'Grants a request for deletion, which is done at once and for good, or refuses it with a reason.',
		params: z.object({ erasureId: idSchema }),
		body: decideErasureSchema,
		answer: erasureSchema,
		status: 200
	}),
	ask: defineOperation({
		id: 'askErasure',
		method: 'POST',
		path: '/api/v1/my/erasure',
		action: 'erasures.ask',
		summary: 'A signed-in customer asks that what is held about them be deleted.',
		body: askErasureSchema,
		answer: myErasureSchema,
		status: 201
	}),
	withdraw: defineOperation({
		id: 'withdrawErasure',
		method: 'POST',
		path: '/api/v1/my/erasure/withdrawal',
		action: 'erasures.withdraw',
		summary: 'A signed-in customer takes back their request for deletion while it waits.',
		answer: myErasureSchema,
		status: 200
	}),
	data: defineOperation({
		id: 'getHeldData',
		method: 'GET',
		path: '/api/v1/my/data',
		action: 'held-data.read-own',
		summary: 'Everything that is held about the signed-in customer; that it was taken is on record.',
		answer: z.custom<object>().meta({ type: 'object', description: 'Under names that a person can read' }),
		status: 200
	})
};
