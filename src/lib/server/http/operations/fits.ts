import { z } from 'zod';
import { bookSchema } from '$lib/schemas/books';
import { idSchema } from '$lib/schemas/fields';
import { fitInputSchema, fitRowSchema, fitSchema, fittedDraftSchema } from '$lib/schemas/fits';
import { defineOperation } from '../operation';

const params = z.object({ fitId: idSchema });

export const fitOperations = {
	list: defineOperation({
		id: 'listFits',
		method: 'GET',
		path: '/api/v1/fits',
		action: 'traces.read',
		summary: 'Coefficients fitted to traces, newest first.',
		answer: z.object({ rows: z.array(fitRowSchema) }),
		status: 200
	}),
	create: defineOperation({
		id: 'createFit',
		method: 'POST',
		path: '/api/v1/fits',
		action: 'traces.write',
		summary:
			'Fits coefficients to traces of assessed positions; ask for the fit until its state is "done" or "failed".',
		body: fitInputSchema,
		answer: fitSchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getFit',
		method: 'GET',
		path: '/api/v1/fits/[fitId]',
		action: 'traces.read',
		summary:
			'A fit: estimates with intervals, what the data could not tell and what would, errors, residuals.',
		params,
		answer: fitSchema,
		status: 200
	}),
	cancel: defineOperation({
		id: 'cancelFit',
		method: 'POST',
		path: '/api/v1/fits/[fitId]/cancellation',
		action: 'traces.write',
		summary: 'Calls off a fit that is still being worked out.',
		params,
		answer: fitSchema,
		status: 200
	}),
	draft: defineOperation({
		id: 'draftFittedBook',
		method: 'POST',
		path: '/api/v1/fits/[fitId]/book',
		action: 'books.write',
		summary: 'Begins a draft book with the fitted values; refused where a trace is synthetic.',
		params,
		body: fittedDraftSchema,
		answer: bookSchema,
		status: 201
	})
};
