import { endpoint, preparedEndpoint } from '$lib/server/http/endpoint';
import { sheetOperations } from '$lib/server/http/operations/sheets';
import { readSheetSource } from '$lib/server/services/sheet-source';
import { listSheets, sendSheet } from '$lib/server/services/sheets';

export const GET = endpoint(sheetOperations.list, async ({ person, params }) => ({
	rows: await listSheets(person, params.jobId)
}));

export const POST = preparedEndpoint(
	sheetOperations.send,
	({ person, body }) => readSheetSource(person, body.recommendationId),
	({ person, params, body }) => sendSheet(person, { ...body, jobId: params.jobId })
);
