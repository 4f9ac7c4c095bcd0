import { z } from 'zod';
import {
	assessRequestSchema,
	assessmentRowSchema,
	assessmentSchema,
	reproductionSchema
} from '$lib/schemas/assessments';
import { idSchema } from '$lib/schemas/fields';
import { outlookSchema } from '$lib/schemas/outlooks';
import { defineOperation } from '../operation';

const params = z.object({ assessmentId: idSchema });
const jobParams = z.object({ jobId: idSchema });

export const assessmentOperations = {
	create: defineOperation({
		id: 'assessMount',
		method: 'POST',
		path: '/api/v1/assessments',
		action: 'assessments.run',
		summary: 'Assesses one mount as its job stands now, and keeps all that went in beside what came out.',
		body: assessRequestSchema,
		answer: assessmentSchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getAssessment',
		method: 'GET',
		path: '/api/v1/assessments/[assessmentId]',
		action: 'assessments.read',
		summary: 'One assessment with everything that went into it.',
		params,
		answer: assessmentSchema,
		status: 200
	}),
	reproduce: defineOperation({
		id: 'reproduceAssessment',
		method: 'GET',
		path: '/api/v1/assessments/[assessmentId]/reproduction',
		action: 'assessments.read',
		summary: 'Makes an assessment again from what was stored with it and compares every digit.',
		params,
		answer: reproductionSchema,
		status: 200
	}),
	outlook: defineOperation({
		id: 'getOutlook',
		method: 'GET',
		path: '/api/v1/assessments/[assessmentId]/outlook',
		action: 'assessments.read',
		summary:
			'What an assessment says beside its number: spread, cut-out days a year, what to measure first, remedies, safe envelope, life, cable and fuse. Worked out at the first asking (some seconds) and kept.',
		params,
		answer: outlookSchema,
		status: 200
	}),
	listOfJob: defineOperation({
		id: 'listAssessments',
		method: 'GET',
		path: '/api/v1/jobs/[jobId]/assessments',
		action: 'assessments.read',
		summary: 'All assessments of a job, newest first.',
		params: jobParams,
		answer: z.object({ rows: z.array(assessmentRowSchema) }),
		status: 200
	}),
	assessJob: defineOperation({
		id: 'assessJob',
		method: 'POST',
		path: '/api/v1/jobs/[jobId]/assessments',
		action: 'assessments.run',
		summary: 'Assesses every mount of a job whose survey is finished: all of them, or none.',
		params: jobParams,
		answer: z.object({ rows: z.array(assessmentSchema) }),
		status: 201
	})
};
