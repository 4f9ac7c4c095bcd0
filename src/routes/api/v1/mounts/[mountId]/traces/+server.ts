import { endpoint } from '$lib/server/http/endpoint';
import { traceOperations } from '$lib/server/http/operations/traces';
import { uploadEndpoint } from '$lib/server/http/upload-endpoint';
import { getMount } from '$lib/server/services/mounts';
import { keepTrace, listMountTraces, prepareTrace } from '$lib/server/services/traces';

export const GET = endpoint(traceOperations.listOfMount, async ({ person, params }) => ({
	rows: await listMountTraces(person, params.mountId)
}));

export const POST = uploadEndpoint(traceOperations.add, {
	find: (person, { mountId }) => getMount(person, mountId),
	nameOf: ({ fileName }) => fileName,
	prepare: prepareTrace,
	keep: ({ person, params: { mountId }, prepared }) => keepTrace(person, mountId, prepared)
});
