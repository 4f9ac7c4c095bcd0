import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import { recommendationInputSchema, recommendationSchema } from '$lib/schemas/recommendations';
import { defineOperation } from '../operation';

export const recommendationOperations = {
	create: defineOperation({
		id: 'makeRecommendation',
		method: 'POST',
		path: '/api/v1/recommendations',
		action: 'recommendations.write',
		summary:
			'Recommends an assessed mount; against "cuts out" or the word of the battery’s maker it takes the name of who decided, and a reason.',
		body: recommendationInputSchema,
		answer: recommendationSchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getRecommendation',
		method: 'GET',
		path: '/api/v1/recommendations/[recommendationId]',
		action: 'assessments.read',
		summary: 'One recommendation.',
		params: z.object({ recommendationId: idSchema }),
		answer: recommendationSchema,
		status: 200
	})
};
