import { endpoint } from '$lib/server/http/endpoint';
import { fileOperations } from '$lib/server/http/operations/files';
import { uploadEndpoint } from '$lib/server/http/upload-endpoint';
import { keepFile, listMountFiles, prepareFile } from '$lib/server/services/files';
import { getMount } from '$lib/server/services/mounts';

export const GET = endpoint(fileOperations.list, async ({ person, params, query }) => ({
	rows: await listMountFiles(person, params.mountId, query)
}));

export const POST = uploadEndpoint(fileOperations.add, {
	find: (person, { mountId }) => getMount(person, mountId),
	nameOf: ({ fileName }) => fileName,
	prepare: prepareFile,
	keep: ({ person, params: { mountId }, query: { fileName: _sentAs, ...place }, prepared }) =>
		keepFile(person, mountId, prepared, place)
});
