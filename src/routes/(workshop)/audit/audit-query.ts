import { auditQuerySchema, type AuditQuery } from '$lib/schemas/audit';

export type AuditAsked = Partial<
	Record<'person' | 'action' | 'subject' | 'words' | 'from' | 'to' | 'cursor', string>
>;

const KEYS = ['person', 'action', 'subject', 'words', 'from', 'to', 'cursor'] as const;

/** A form without a script sends every box, also those that were left alone. */
export function readAuditAsked(params: URLSearchParams): AuditAsked {
	const asked: AuditAsked = {};
	for (const key of KEYS) {
		const value = params.get(key)?.trim();
		if (value) asked[key] = value;
	}
	return asked;
}

/** What was asked, checked; or what is wrong with it, in words. */
export function parseAsked(asked: AuditAsked): { query: AuditQuery } | { problem: string } {
	const parsed = auditQuerySchema.safeParse(asked);
	if (parsed.success) return { query: parsed.data };
	return { problem: parsed.error.issues[0]?.message ?? 'The list cannot be shown like that.' };
}

export function auditHref(asked: AuditAsked, path = '/audit'): string {
	const params = new URLSearchParams(Object.entries(asked));
	return params.size > 0 ? `${path}?${params}` : path;
}
