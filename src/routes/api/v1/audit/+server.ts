import { endpoint } from '$lib/server/http/endpoint';
import { auditOperations } from '$lib/server/http/operations/audit';
import { listAudit } from '$lib/server/services/audit-list';

export const GET = endpoint(auditOperations.list, ({ person, query }) => listAudit(person, query));
