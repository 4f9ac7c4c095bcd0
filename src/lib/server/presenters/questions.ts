import type { Question } from '$lib/schemas/questions';
import type { CustomerMessage } from '../db/models';

const presentMessage = ({ id, authorName, createdAt, body }: CustomerMessage) => ({
	...{ id, name: authorName, words: body },
	at: createdAt.toISOString()
});

/** The messages of a job as questions with their answers, in the order in which they were written. */
export function presentQuestions(messages: readonly CustomerMessage[], isErased: boolean): Question[] {
	return messages
		.filter(({ questionId }) => (questionId ?? null) === null)
		.map((question) => ({
			...presentMessage(question),
			answers: messages.filter(({ questionId }) => questionId === question.id).map(presentMessage),
			takesAnswers: !isErased
		}));
}
