import { endpoint } from '$lib/server/http/endpoint';
import { fittingOperations } from '$lib/server/http/operations/fittings';
import { addFieldNote, listFieldNotes } from '$lib/server/services/field-notes';

export const GET = endpoint(fittingOperations.notes, ({ person, params, query }) =>
	listFieldNotes(person, params.mountId, query.namedAh ?? null)
);

export const POST = endpoint(fittingOperations.addNote, ({ person, params, body }) =>
	addFieldNote(person, params.mountId, body)
);
