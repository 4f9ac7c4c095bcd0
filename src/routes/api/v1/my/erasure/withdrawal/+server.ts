import { endpoint } from '$lib/server/http/endpoint';
import { erasureOperations } from '$lib/server/http/operations/erasures';
import { withdrawErasure } from '$lib/server/services/erasures';

export const POST = endpoint(erasureOperations.withdraw, ({ person }) => withdrawErasure(person));
