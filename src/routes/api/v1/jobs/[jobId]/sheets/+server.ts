import { endpoint } from '$lib/server/http/endpoint';
import { sheetOperations } from '$lib/server/http/operations/sheets';
import { listSheets, sendSheet } from '$lib/server/services/sheets';

export const GET = endpoint(sheetOperations.list, async ({ person, params }) => ({
	rows: await listSheets(person, params.jobId)
}));

export const POST = endpoint(sheetOperations.send, ({ person, params, body }) =>
	sendSheet(person, { ...body, jobId: params.jobId })
);
