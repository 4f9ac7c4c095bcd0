import { endpoint } from '$lib/server/http/endpoint';
import { fittingOperations } from '$lib/server/http/operations/fittings';
import { strikeFieldNote } from '$lib/server/services/field-strikes';

export const POST = endpoint(fittingOperations.strikeNote, ({ person, params, body }) =>
	strikeFieldNote(person, params.mountId, params.noteId, body)
);
