import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import { sentLetterSchema } from '$lib/schemas/letters';
import { defineOperation } from '../operation';

export const letterOperations = {
	list: defineOperation({
		id: 'listSentLetters',
		method: 'GET',
		path: '/api/v1/jobs/[jobId]/letters',
		action: 'jobs.read',
		summary: 'Every letter of a job, the newest first: to whom it went and what became of it.',
		params: z.object({ jobId: idSchema }),
		answer: z.object({ rows: z.array(sentLetterSchema) }),
		status: 200
	}),
	listFailed: defineOperation({
		id: 'listFailedLetters',
		method: 'GET',
		path: '/api/v1/letters',
		action: 'shop.write',
		summary: 'Letters that were given up, or may have arrived, and belong to no job, the newest first.',
		answer: z.object({ rows: z.array(sentLetterSchema) }),
		status: 200
	}),
	again: defineOperation({
		id: 'sendLetterAgain',
		method: 'POST',
		path: '/api/v1/letters/[letterId]/tries',
		action: 'sheets.write',
		summary: 'Gives a letter that was given up, or may have arrived, another row of tries.',
		params: z.object({ letterId: idSchema }),
		answer: sentLetterSchema,
		status: 200
	}),
	arrived: defineOperation({
		id: 'noteLetterArrived',
		method: 'POST',
		path: '/api/v1/letters/[letterId]/arrivals',
		action: 'sheets.write',
		summary: 'Notes that a letter which may have arrived did, as its reader says.',
		params: z.object({ letterId: idSchema }),
		answer: sentLetterSchema,
		status: 200
	})
};
