import { z } from 'zod';
import { dayPlanSchema } from '$lib/schemas/day-plans';
import { idSchema } from '$lib/schemas/fields';
import {
	curveQuerySchema,
	curveSchema,
	legsChangeSchema,
	traceMappingChangeSchema,
	tracePlanSchema,
	traceRowSchema,
	traceSchema
} from '$lib/schemas/traces';
import { MOST_TRACE_BYTES } from '$lib/thermal/traces';
import { defineFileOperation, defineOperation } from '../operation';

const ofMount = z.object({ mountId: idSchema });
const params = z.object({ traceId: idSchema });
const rows = z.object({ rows: z.array(traceRowSchema) });
const legs = traceSchema.pick({ legs: true, legsBy: true, version: true, startHour: true });

export const traceOperations = {
	list: defineOperation({
		id: 'listTraces',
		method: 'GET',
		path: '/api/v1/traces',
		action: 'traces.read',
		summary: 'What loggers measured in the workshop, newest first.',
		answer: rows,
		status: 200
	}),
	listOfMount: defineOperation({
		id: 'listMountTraces',
		method: 'GET',
		path: '/api/v1/mounts/[mountId]/traces',
		action: 'traces.read',
		summary: 'What loggers measured at a position, newest first.',
		params: ofMount,
		answer: rows,
		status: 200
	}),
	add: defineFileOperation({
		id: 'addTrace',
		method: 'POST',
		path: '/api/v1/mounts/[mountId]/traces',
		action: 'traces.write',
		summary:
			"Takes a logger's CSV, says what it seems to be, and keeps it until its mapping is confirmed or seven days have passed.",
		params: ofMount,
		query: z.object({
			fileName: z.string().max(200).default('').meta({ description: 'Of a file that is sent as the body' })
		}),
		mostFileBytes: MOST_TRACE_BYTES,
		fileMedia: ['text/csv', 'text/plain', 'application/octet-stream'],
		answer: traceSchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getTrace',
		method: 'GET',
		path: '/api/v1/traces/[traceId]',
		action: 'traces.read',
		summary: 'A trace: how it is read, what became of every row, its legs.',
		params,
		answer: traceSchema,
		status: 200
	}),
	read: defineOperation({
		id: 'readTrace',
		method: 'PUT',
		path: '/api/v1/traces/[traceId]/mapping',
		action: 'traces.write',
		summary:
			'Confirms which column is what, remembers it for the logger, and begins to read the file; ask for the trace until its state is "read".',
		params,
		body: traceMappingChangeSchema,
		answer: traceSchema,
		status: 200
	}),
	curve: defineOperation({
		id: 'getTraceCurve',
		method: 'GET',
		path: '/api/v1/traces/[traceId]/curve',
		action: 'traces.read',
		summary: 'Mean, lowest and highest of channels between two times, with at most so many points each.',
		params,
		query: curveQuerySchema,
		answer: curveSchema,
		status: 200
	}),
	legs: defineOperation({
		id: 'getTraceLegs',
		method: 'GET',
		path: '/api/v1/traces/[traceId]/legs',
		action: 'traces.read',
		summary: 'The legs of a trace: as they were proposed, or as somebody put them right.',
		params,
		answer: legs,
		status: 200
	}),
	setLegs: defineOperation({
		id: 'setTraceLegs',
		method: 'PUT',
		path: '/api/v1/traces/[traceId]/legs',
		action: 'traces.write',
		summary: 'Puts the legs right; they follow each other from the beginning of the trace to its end.',
		params,
		body: legsChangeSchema,
		answer: legs,
		status: 200
	}),
	plan: defineOperation({
		id: 'useTraceAsDayPlan',
		method: 'PUT',
		path: '/api/v1/traces/[traceId]/day-plan',
		action: 'traces.write',
		summary: "Lets the job of the trace's position have the legs as its day plan.",
		params,
		body: tracePlanSchema,
		answer: dayPlanSchema,
		status: 200
	}),
	remove: defineOperation({
		id: 'removeTrace',
		method: 'DELETE',
		path: '/api/v1/traces/[traceId]',
		action: 'traces.write',
		summary: 'Takes a trace away; for 30 days it can be put back, then it is gone for good.',
		params,
		answer: traceSchema,
		status: 200
	}),
	restore: defineOperation({
		id: 'restoreTrace',
		method: 'POST',
		path: '/api/v1/traces/[traceId]/restore',
		action: 'traces.write',
		summary: 'Puts a removed trace back; one that is there is left alone.',
		params,
		answer: traceSchema,
		status: 200
	})
};
