import { contentEndpoint } from '$lib/server/http/endpoint';
import { fileOperations } from '$lib/server/http/operations/files';
import { readFileContent } from '$lib/server/services/files';

export const GET = contentEndpoint(fileOperations.content, ({ person, params, query }) =>
	readFileContent(person, params.fileId, query.size)
);
