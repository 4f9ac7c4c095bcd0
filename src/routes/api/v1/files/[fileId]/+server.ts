import { endpoint } from '$lib/server/http/endpoint';
import { fileOperations } from '$lib/server/http/operations/files';
import { changeFile, getFile, removeFile } from '$lib/server/services/files';

export const GET = endpoint(fileOperations.get, ({ person, params }) => getFile(person, params.fileId));

export const PATCH = endpoint(fileOperations.change, ({ person, params, body }) =>
	changeFile(person, params.fileId, body)
);

export const DELETE = endpoint(fileOperations.remove, ({ person, params }) =>
	removeFile(person, params.fileId)
);
