import { endpoint } from '$lib/server/http/endpoint';
import { erasureOperations } from '$lib/server/http/operations/erasures';
import { listErasures } from '$lib/server/services/erasures';

export const GET = endpoint(erasureOperations.list, async ({ person }) => ({
	rows: await listErasures(person)
}));
