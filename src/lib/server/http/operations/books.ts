import { z } from 'zod';
import { bookRowSchema, bookSchema } from '$lib/schemas/books';
import { idSchema } from '$lib/schemas/fields';
import { defineOperation } from '../operation';

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
	})
};
