import { auditCheckSchema, auditPageSchema, auditQuerySchema } from '$lib/schemas/audit';
import { defineOperation } from '../operation';

export const auditOperations = {
	list: defineOperation({
		id: 'listAudit',
		method: 'GET',
		path: '/api/v1/audit',
		action: 'audit.read',
		summary: 'Who did what in the workshop, the newest first.',
		query: auditQuerySchema,
		answer: auditPageSchema,
		status: 200
	}),
	check: defineOperation({
		id: 'checkAudit',
		method: 'POST',
		path: '/api/v1/audit/check',
		action: 'audit.read',
		summary: 'Looks the whole trail through: nothing edited, deleted, swapped or cut off.',
		answer: auditCheckSchema,
		status: 200
	})
};
