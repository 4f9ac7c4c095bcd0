import { endpoint } from '$lib/server/http/endpoint';
import { sheetOperations } from '$lib/server/http/operations/sheets';
import { retrySheetLetter } from '$lib/server/services/sheets';

export const POST = endpoint(sheetOperations.tryLetterAgain, ({ person, params }) =>
	retrySheetLetter(person, params.sheetId)
);
