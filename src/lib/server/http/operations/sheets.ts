import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import { sendSheetSchema, sheetStatusSchema } from '$lib/schemas/sheets';
import { defineOperation } from '../operation';

const jobParams = z.object({ jobId: idSchema });
const params = z.object({ sheetId: idSchema });

export const sheetOperations = {
	list: defineOperation({
		id: 'listSheets',
		method: 'GET',
		path: '/api/v1/jobs/[jobId]/sheets',
		action: 'jobs.read',
		summary: 'The customer sheets of a job, newest first, and what became of each.',
		params: jobParams,
		answer: z.object({ rows: z.array(sheetStatusSchema) }),
		status: 200
	}),
	send: defineOperation({
		id: 'sendSheet',
		method: 'POST',
		path: '/api/v1/jobs/[jobId]/sheets',
		action: 'sheets.write',
		summary: "Writes the customer's page from the newest recommendation and mails its link.",
		params: jobParams,
		body: sendSheetSchema,
		answer: z.object({ sheet: sheetStatusSchema }),
		status: 201
	}),
	withdraw: defineOperation({
		id: 'withdrawSheet',
		method: 'POST',
		path: '/api/v1/sheets/[sheetId]/withdrawal',
		action: 'sheets.write',
		summary: "Stops a sheet's link for good.",
		params,
		answer: sheetStatusSchema,
		status: 200
	}),
	tryLetterAgain: defineOperation({
		id: 'tryLetterAgain',
		method: 'POST',
		path: '/api/v1/sheets/[sheetId]/letter',
		action: 'sheets.write',
		summary: 'Tries again to send a letter that was given up.',
		params,
		answer: sheetStatusSchema,
		status: 200
	})
};
