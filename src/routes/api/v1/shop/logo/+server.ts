import { endpoint, fileEndpoint } from '$lib/server/http/endpoint';
import { shopOperations } from '$lib/server/http/operations/shop';
import { getShop, removeLogo, saveLogo } from '$lib/server/services/shop';

export const POST = fileEndpoint(shopOperations.saveLogo, {
	find: (person) => getShop(person),
	nameOf: () => 'logo',
	handle: ({ person, file }) => saveLogo(person, file.bytes)
});

export const DELETE = endpoint(shopOperations.removeLogo, ({ person, body }) =>
	removeLogo(person, body.version)
);
