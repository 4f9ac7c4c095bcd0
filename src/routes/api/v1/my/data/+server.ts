import { endpoint } from '$lib/server/http/endpoint';
import { erasureOperations } from '$lib/server/http/operations/erasures';
import { getHeldData } from '$lib/server/services/held-data';

export const GET = endpoint(erasureOperations.data, ({ person }) => getHeldData(person));
