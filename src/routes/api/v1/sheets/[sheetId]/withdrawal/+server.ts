import { endpoint } from '$lib/server/http/endpoint';
import { sheetOperations } from '$lib/server/http/operations/sheets';
import { withdrawSheet } from '$lib/server/services/sheets';

export const POST = endpoint(sheetOperations.withdraw, ({ person, params }) =>
	withdrawSheet(person, params.sheetId)
);
