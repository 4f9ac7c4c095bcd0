import { endpoint } from '$lib/server/http/endpoint';
import { shopOperations } from '$lib/server/http/operations/shop';
import { saveFactorRule } from '$lib/server/services/shop';

export const PUT = endpoint(shopOperations.factorRule, ({ person, body }) => saveFactorRule(person, body));
