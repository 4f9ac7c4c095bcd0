import { endpoint } from '$lib/server/http/endpoint';
import { questionOperations } from '$lib/server/http/operations/questions';
import { listQuestions } from '$lib/server/services/questions';

export const GET = endpoint(questionOperations.list, async ({ person, params }) => ({
	rows: await listQuestions(person, params.jobId)
}));
