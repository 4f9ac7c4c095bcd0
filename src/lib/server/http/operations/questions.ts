import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import { answerSchema, askSchema, questionSchema } from '$lib/schemas/questions';
import { defineOperation } from '../operation';

const answer = z.object({ rows: z.array(questionSchema) });
const mySheet = z.object({ sheetId: idSchema });

export const questionOperations = {
	list: defineOperation({
		id: 'listQuestions',
		method: 'GET',
		path: '/api/v1/jobs/[jobId]/questions',
		action: 'jobs.read',
		summary: 'What the customer asked about a job, oldest first, and what was answered.',
		params: z.object({ jobId: idSchema }),
		answer,
		status: 200
	}),
	answer: defineOperation({
		id: 'answerQuestion',
		method: 'POST',
		path: '/api/v1/questions/[questionId]/answers',
		action: 'questions.answer',
		summary: 'Answers a question for good: by e-mail, and on the customer’s page.',
		params: z.object({ questionId: idSchema }),
		body: answerSchema,
		answer,
		status: 201
	}),
	listMine: defineOperation({
		id: 'listMyQuestions',
		method: 'GET',
		path: '/api/v1/my/sheets/[sheetId]/questions',
		action: 'documents.read-own',
		summary: 'What a signed-in customer asked on a page of theirs, and what the shop answered.',
		params: mySheet,
		answer,
		status: 200
	}),
	ask: defineOperation({
		id: 'askQuestion',
		method: 'POST',
		path: '/api/v1/my/sheets/[sheetId]/questions',
		action: 'questions.ask',
		summary: 'A signed-in customer asks the shop, which gets a letter.',
		params: mySheet,
		body: askSchema,
		answer,
		status: 201
	})
};
