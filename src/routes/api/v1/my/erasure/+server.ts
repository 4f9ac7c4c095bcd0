import { endpoint } from '$lib/server/http/endpoint';
import { erasureOperations } from '$lib/server/http/operations/erasures';
import { askErasure } from '$lib/server/services/erasures';

export const POST = endpoint(erasureOperations.ask, ({ person }) => askErasure(person));
