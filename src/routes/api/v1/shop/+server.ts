import { endpoint } from '$lib/server/http/endpoint';
import { shopOperations } from '$lib/server/http/operations/shop';
import { getShop, saveShop } from '$lib/server/services/shop';

export const GET = endpoint(shopOperations.get, ({ person }) => getShop(person));

export const PUT = endpoint(shopOperations.save, ({ person, body }) => saveShop(person, body));
