import { z } from 'zod';
import { cableChangeSchema } from '$lib/schemas/cables';
import { idSchema } from '$lib/schemas/fields';
import { mountInputSchema, mountSchema, mountSurveySchema } from '$lib/schemas/mounts';
import { defineOperation } from '../operation';

const ofJob = z.object({ jobId: idSchema });
const params = z.object({ mountId: idSchema });

export const mountOperations = {
	list: defineOperation({
		id: 'listMounts',
		method: 'GET',
		path: '/api/v1/jobs/[jobId]/mounts',
		action: 'jobs.read',
		summary: 'The positions that a job compares, without those that were removed.',
		params: ofJob,
		answer: z.object({ rows: z.array(mountSchema) }),
		status: 200
	}),
	add: defineOperation({
		id: 'addMount',
		method: 'POST',
		path: '/api/v1/jobs/[jobId]/mounts',
		action: 'mounts.write',
		summary: 'Adds a position to a job; it gets the next free letter.',
		params: ofJob,
		body: mountInputSchema,
		answer: mountSchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getMount',
		method: 'GET',
		path: '/api/v1/mounts/[mountId]',
		action: 'jobs.read',
		summary: 'One position with its survey as it stands.',
		params,
		answer: mountSchema,
		status: 200
	}),
	remove: defineOperation({
		id: 'removeMount',
		method: 'DELETE',
		path: '/api/v1/mounts/[mountId]',
		action: 'mounts.write',
		summary: 'Takes a position off the job; it can be restored with all its answers.',
		params,
		answer: mountSchema,
		status: 200
	}),
	restore: defineOperation({
		id: 'restoreMount',
		method: 'POST',
		path: '/api/v1/mounts/[mountId]/restore',
		action: 'mounts.write',
		summary: 'Puts a removed position back; one that stands is left alone.',
		params,
		answer: mountSchema,
		status: 200
	}),
	survey: defineOperation({
		id: 'saveSurvey',
		method: 'PUT',
		path: '/api/v1/mounts/[mountId]/survey',
		action: 'mounts.write',
		summary: 'Saves the answers, if nobody changed them since they were read.',
		params,
		body: mountSurveySchema,
		answer: mountSchema,
		status: 200
	}),
	cable: defineOperation({
		id: 'saveCable',
		method: 'PUT',
		path: '/api/v1/mounts/[mountId]/cable',
		action: 'mounts.write',
		summary: 'Keeps the cable and fuse that are proposed for a position; null takes the proposal back.',
		params,
		body: cableChangeSchema,
		answer: mountSchema,
		status: 200
	})
};
