import { endpoint } from '$lib/server/http/endpoint';
import { shopOperations } from '$lib/server/http/operations/shop';
import { getRetention, saveRetention } from '$lib/server/services/retention';

export const GET = endpoint(shopOperations.getRetention, ({ person }) => getRetention(person));

export const PUT = endpoint(shopOperations.saveRetention, ({ person, body }) => saveRetention(person, body));
