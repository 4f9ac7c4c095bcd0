import { endpoint, preparedEndpoint } from '$lib/server/http/endpoint';
import { fitOperations } from '$lib/server/http/operations/fits';
import { createFit, listFits, prepareFit } from '$lib/server/services/fits';

export const GET = endpoint(fitOperations.list, async ({ person }) => ({ rows: await listFits(person) }));

export const POST = preparedEndpoint(
	fitOperations.create,
	({ person, body }) => prepareFit(person, body),
	({ person, body }, prepared) => createFit(person, body, prepared)
);
