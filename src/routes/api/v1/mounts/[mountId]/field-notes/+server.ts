import { endpoint, preparedEndpoint } from '$lib/server/http/endpoint';
import { fittingOperations } from '$lib/server/http/operations/fittings';
import { keepFieldNote, listFieldNotes, weighFieldNote } from '$lib/server/services/field-notes';

export const GET = endpoint(fittingOperations.notes, ({ person, params, query }) =>
	listFieldNotes(person, params.mountId, query.namedAh ?? null)
);

export const POST = preparedEndpoint(
	fittingOperations.addNote,
	({ person, params, body }) => weighFieldNote(person, params.mountId, body),
	({ person, params }, weighed) => keepFieldNote(person, params.mountId, weighed)
);
