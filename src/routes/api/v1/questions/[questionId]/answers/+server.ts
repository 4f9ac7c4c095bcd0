import { endpoint } from '$lib/server/http/endpoint';
import { questionOperations } from '$lib/server/http/operations/questions';
import { answerQuestion } from '$lib/server/services/questions';

export const POST = endpoint(questionOperations.answer, async ({ person, params, body }) => ({
	rows: await answerQuestion(person, params.questionId, body.answer)
}));
