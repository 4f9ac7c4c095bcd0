import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import { preDrillChangeSchema, preDrillSchema, preDrillSignatureSchema } from '$lib/schemas/pre-drill';
import { defineOperation } from '../operation';

const params = z.object({ mountId: idSchema });

export const preDrillOperations = {
	get: defineOperation({
		id: 'getPreDrill',
		method: 'GET',
		path: '/api/v1/mounts/[mountId]/pre-drill',
		action: 'jobs.read',
		summary: 'What is asked before drilling for a position and its battery, with the answers so far.',
		params,
		answer: preDrillSchema,
		status: 200
	}),
	save: defineOperation({
		id: 'savePreDrill',
		method: 'PUT',
		path: '/api/v1/mounts/[mountId]/pre-drill',
		action: 'mounts.write',
		summary: 'Keeps the answers before drilling; another answer takes the signature off.',
		params,
		body: preDrillChangeSchema,
		answer: preDrillSchema,
		status: 200
	}),
	sign: defineOperation({
		id: 'signPreDrill',
		method: 'PUT',
		path: '/api/v1/mounts/[mountId]/pre-drill/signature',
		action: 'mounts.write',
		summary: 'Puts a name and the time under the answers before drilling as they stand.',
		params,
		body: preDrillSignatureSchema,
		answer: preDrillSchema,
		status: 200
	})
};
