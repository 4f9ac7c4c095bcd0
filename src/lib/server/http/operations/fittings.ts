import { z } from 'zod';
import {
	fieldNoteInputSchema,
	fieldNotesQuerySchema,
	fieldNotesSchema,
	fieldNoteStrikeSchema
} from '$lib/schemas/field-notes';
import { idSchema } from '$lib/schemas/fields';
import {
	agreementChangeSchema,
	fittingChangeSchema,
	fittingSchema,
	followUpChangeSchema
} from '$lib/schemas/fitting';
import { defineOperation } from '../operation';

const params = z.object({ mountId: idSchema });

export const fittingOperations = {
	get: defineOperation({
		id: 'getFitting',
		method: 'GET',
		path: '/api/v1/mounts/[mountId]/fitting',
		action: 'jobs.read',
		summary: 'What was agreed for a position, what was fitted, and when it is to be looked at.',
		params,
		answer: fittingSchema,
		status: 200
	}),
	save: defineOperation({
		id: 'saveFitting',
		method: 'PUT',
		path: '/api/v1/mounts/[mountId]/fitting',
		action: 'mounts.write',
		summary: 'Keeps what was fitted; the first time it also sets the dates of the follow-ups.',
		params,
		body: fittingChangeSchema,
		answer: fittingSchema,
		status: 200
	}),
	hold: defineOperation({
		id: 'holdFitting',
		method: 'PUT',
		path: '/api/v1/mounts/[mountId]/fitting/agreement',
		action: 'mounts.write',
		summary:
			'Holds what was fitted against another recommendation of its position: differences are compared anew, and papers, expectations and findings follow. Works out every note anew first.',
		params,
		body: agreementChangeSchema,
		answer: fittingSchema,
		status: 200
	}),
	finish: defineOperation({
		id: 'finishFollowUp',
		method: 'POST',
		path: '/api/v1/follow-ups/[followUpId]/done',
		action: 'mounts.write',
		summary: 'Says whether a follow-up is done.',
		params: z.object({ followUpId: idSchema }),
		body: followUpChangeSchema,
		answer: fittingSchema,
		status: 200
	}),
	notes: defineOperation({
		id: 'listFieldNotes',
		method: 'GET',
		path: '/api/v1/mounts/[mountId]/field-notes',
		action: 'jobs.read',
		summary: 'What was noted of a fitted battery, the newest first, and where its capacity goes.',
		params,
		query: fieldNotesQuerySchema,
		answer: fieldNotesSchema,
		status: 200
	}),
	addNote: defineOperation({
		id: 'addFieldNote',
		method: 'POST',
		path: '/api/v1/mounts/[mountId]/field-notes',
		action: 'mounts.write',
		summary: 'Keeps a note for good, with what the model makes of it: was it heat, and what does it teach.',
		params,
		body: fieldNoteInputSchema,
		answer: fieldNotesSchema,
		status: 201
	}),
	strikeNote: defineOperation({
		id: 'strikeFieldNote',
		method: 'POST',
		path: '/api/v1/mounts/[mountId]/field-notes/[noteId]/strike',
		action: 'mounts.write',
		summary: 'Strikes a note out, once and for good: it stays on record with the reason, and counts nowhere.',
		params: params.extend({ noteId: idSchema }),
		body: fieldNoteStrikeSchema,
		answer: fieldNotesSchema,
		status: 201
	})
};
