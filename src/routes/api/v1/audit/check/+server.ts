import { endpoint } from '$lib/server/http/endpoint';
import { auditOperations } from '$lib/server/http/operations/audit';
import { checkOwnTrail } from '$lib/server/services/audit-check';

export const POST = endpoint(auditOperations.check, ({ person }) => checkOwnTrail(person));
