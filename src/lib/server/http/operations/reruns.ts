import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import {
	changesQuerySchema,
	rerunChangeSchema,
	rerunItemParams,
	rerunLeftSchema,
	rerunMoveSchema,
	rerunSchema,
	tellSchema
} from '$lib/schemas/reruns';
import { defineOperation } from '../operation';

const params = z.object({ rerunId: idSchema });

export const rerunOperations = {
	list: defineOperation({
		id: 'listReruns',
		method: 'GET',
		path: '/api/v1/reruns',
		action: 'reruns.read',
		summary: 'Assessments made again because a book came into force or was withdrawn, the newest first.',
		answer: z.object({ rows: z.array(rerunSchema) }),
		status: 200
	}),
	get: defineOperation({
		id: 'getRerun',
		method: 'GET',
		path: '/api/v1/reruns/[rerunId]',
		action: 'reruns.read',
		summary: 'One re-run, and how far it is.',
		params,
		answer: rerunSchema,
		status: 200
	}),
	move: defineOperation({
		id: 'moveRerun',
		method: 'PUT',
		path: '/api/v1/reruns/[rerunId]/state',
		action: 'reruns.write',
		summary: 'Stops a re-run, which keeps what it made so far, or lets it go on.',
		params,
		body: rerunMoveSchema,
		answer: rerunSchema,
		status: 200
	}),
	changes: defineOperation({
		id: 'listRerunChanges',
		method: 'GET',
		path: '/api/v1/reruns/[rerunId]/changes',
		action: 'reruns.read',
		summary: 'The verdicts that changed, 25 a page, each with who should be told and a letter to start from.',
		params,
		query: changesQuerySchema,
		answer: z.object({ rows: z.array(rerunChangeSchema), hasMore: z.boolean() }),
		status: 200
	}),
	left: defineOperation({
		id: 'listRerunLeft',
		method: 'GET',
		path: '/api/v1/reruns/[rerunId]/left',
		action: 'reruns.read',
		summary: 'What was not assessed again, each with the reason.',
		params,
		answer: z.object({ rows: z.array(rerunLeftSchema) }),
		status: 200
	}),
	tell: defineOperation({
		id: 'tellOfChange',
		method: 'POST',
		path: '/api/v1/reruns/[rerunId]/changes/[itemId]/telling',
		action: 'reruns.write',
		summary:
			'Sends a customer the letter about their changed verdict, or notes that they were told otherwise; once.',
		params: rerunItemParams,
		body: tellSchema,
		answer: rerunChangeSchema,
		status: 200
	})
};
