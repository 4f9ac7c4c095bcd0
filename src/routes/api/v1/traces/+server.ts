import { endpoint } from '$lib/server/http/endpoint';
import { traceOperations } from '$lib/server/http/operations/traces';
import { listTraces } from '$lib/server/services/traces';

export const GET = endpoint(traceOperations.list, async ({ person }) => ({ rows: await listTraces(person) }));
