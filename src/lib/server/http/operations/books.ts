import { z } from 'zod';
import {
	bookComparisonSchema,
	bookDraftSchema,
	bookMoveSchema,
	bookRowSchema,
	bookSchema,
	coefficientChangeSchema,
	readCoefficientPath
} from '$lib/schemas/books';
import { idSchema } from '$lib/schemas/fields';
import { defineOperation } from '../operation';

const coefficientPathSchema = z.string().transform((path, context) => {
	const read = readCoefficientPath(path);
	if (read) return read;
	context.addIssue({ code: 'custom', message: 'There is no such coefficient.' });
	return z.NEVER;
});

export const bookOperations = {
	list: defineOperation({
		id: 'listBooks',
		method: 'GET',
		path: '/api/v1/books',
		action: 'books.read',
		summary: 'The coefficient books of the workshop, newest first; one of them is in force.',
		answer: z.object({ rows: z.array(bookRowSchema) }),
		status: 200
	}),
	get: defineOperation({
		id: 'getBook',
		method: 'GET',
		path: '/api/v1/books/[bookId]',
		action: 'books.read',
		summary: 'One coefficient book, each value with its unit, its default and its source.',
		params: z.object({ bookId: idSchema }),
		answer: bookSchema,
		status: 200
	}),
	draft: defineOperation({
		id: 'draftBook',
		method: 'POST',
		path: '/api/v1/books',
		action: 'books.write',
		summary: 'Begins a draft with the values of another book.',
		body: bookDraftSchema,
		answer: bookSchema,
		status: 201
	}),
	change: defineOperation({
		id: 'changeCoefficient',
		method: 'PUT',
		path: '/api/v1/books/[bookId]/coefficients/[coefficient]',
		action: 'books.write',
		summary:
			'Changes one value of a draft, named by its group and key such as "bay.share", and says where it comes from.',
		params: z.object({ bookId: idSchema, coefficient: coefficientPathSchema }),
		body: coefficientChangeSchema,
		answer: bookSchema,
		status: 200
	}),
	move: defineOperation({
		id: 'moveBook',
		method: 'PUT',
		path: '/api/v1/books/[bookId]/state',
		action: 'books.write',
		summary:
			'Puts a draft on trial, a book on trial in force (by somebody who did not make it; the former one is withdrawn), or withdraws it.',
		params: z.object({ bookId: idSchema }),
		body: bookMoveSchema,
		answer: bookSchema,
		status: 200
	}),
	compare: defineOperation({
		id: 'compareBooks',
		method: 'GET',
		path: '/api/v1/books/[bookId]/against/[otherId]',
		action: 'books.read',
		summary: 'What differs between two books.',
		params: z.object({ bookId: idSchema, otherId: idSchema }),
		answer: bookComparisonSchema,
		status: 200
	})
};
