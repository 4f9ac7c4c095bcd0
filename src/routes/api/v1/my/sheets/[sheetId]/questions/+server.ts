import { endpoint } from '$lib/server/http/endpoint';
import { questionOperations } from '$lib/server/http/operations/questions';
import { askOnMySheet, listMyQuestions } from '$lib/server/services/questions';

export const GET = endpoint(questionOperations.listMine, async ({ person, params }) => ({
	rows: await listMyQuestions(person, params.sheetId)
}));

export const POST = endpoint(questionOperations.ask, async ({ person, params, body }) => ({
	rows: await askOnMySheet(person, params.sheetId, body)
}));
