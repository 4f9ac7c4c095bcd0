import { accuracySchema, readingsQuerySchema, readingsSchema } from '$lib/schemas/accuracy';
import { defineOperation } from '../operation';

export const accuracyOperations = {
	read: defineOperation({
		id: 'readAccuracy',
		method: 'GET',
		path: '/api/v1/accuracy',
		action: 'books.read',
		summary:
			'How the predictions did against what was measured or reported afterwards: errors by book, climate and position, stated chances against what happened, with exact intervals.',
		answer: accuracySchema,
		status: 200
	}),
	readings: defineOperation({
		id: 'listReadings',
		method: 'GET',
		path: '/api/v1/accuracy/readings',
		action: 'books.read',
		summary: 'Single readings beside what was predicted of them at the time, the furthest off first.',
		query: readingsQuerySchema,
		answer: readingsSchema,
		status: 200
	})
};
