import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import {
	jobBatterySchema,
	jobClimateSchema,
	jobPageSchema,
	jobQuerySchema,
	jobSchema,
	newJobSchema,
	repeatJobSchema
} from '$lib/schemas/jobs';
import { defineOperation } from '../operation';

const params = z.object({ jobId: idSchema });

export const jobOperations = {
	list: defineOperation({
		id: 'listJobs',
		method: 'GET',
		path: '/api/v1/jobs',
		action: 'jobs.read',
		summary: 'The jobs of the workshop, filtered and ordered, a page at a time.',
		query: jobQuerySchema,
		answer: jobPageSchema,
		status: 200
	}),
	create: defineOperation({
		id: 'createJob',
		method: 'POST',
		path: '/api/v1/jobs',
		action: 'jobs.write',
		summary: 'Begins a job with its customer and vehicle.',
		body: newJobSchema,
		answer: jobSchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getJob',
		method: 'GET',
		path: '/api/v1/jobs/[jobId]',
		action: 'jobs.read',
		summary: 'One job with all that stands on its sheet.',
		params,
		answer: jobSchema,
		status: 200
	}),
	setBattery: defineOperation({
		id: 'setJobBattery',
		method: 'PUT',
		path: '/api/v1/jobs/[jobId]/battery',
		action: 'jobs.write',
		summary: 'Chooses the battery that is to be fitted, if nobody changed the job since it was read.',
		params,
		body: jobBatterySchema,
		answer: jobSchema,
		status: 200
	}),
	setClimate: defineOperation({
		id: 'setJobClimate',
		method: 'PUT',
		path: '/api/v1/jobs/[jobId]/climate',
		action: 'jobs.write',
		summary:
			'Chooses the place, the hot day to plan for and the days on the road, if nobody changed the job since it was read.',
		params,
		body: jobClimateSchema,
		answer: jobSchema,
		status: 200
	}),
	repeat: defineOperation({
		id: 'repeatJob',
		method: 'POST',
		path: '/api/v1/vehicles/[vehicleId]/jobs',
		action: 'jobs.write',
		summary:
			'Begins another job on a known vehicle, with the battery, the hot day and the days on the road of its last job.',
		params: z.object({ vehicleId: idSchema }),
		body: repeatJobSchema.omit({ vehicleId: true }),
		answer: jobSchema,
		status: 201
	})
};
