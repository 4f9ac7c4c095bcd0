import { endpoint } from '$lib/server/http/endpoint';
import { fileOperations } from '$lib/server/http/operations/files';
import { restoreFile } from '$lib/server/services/files';

export const POST = endpoint(fileOperations.restore, ({ person, params }) =>
	restoreFile(person, params.fileId)
);
