import type { FieldProblem } from '$lib/components/forms/field';
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

const NOBODY_LIKE_THAT = 'Choose somebody from the list.';

/** What was asked, checked; or what is wrong with it, box by box. */
export function parseAsked(asked: AuditAsked): { query: AuditQuery } | { problems: FieldProblem[] } {
	const parsed = auditQuerySchema.safeParse(asked);
	if (parsed.success) return { query: parsed.data };
	const problems = parsed.error.issues.map(({ path: [box], message }) => ({
		path: String(box),
		message: box === 'person' ? NOBODY_LIKE_THAT : message
	}));
	return { problems };
}

export function auditHref(asked: AuditAsked, path = '/audit'): string {
	const params = new URLSearchParams(Object.entries(asked));
	return params.size > 0 ? `${path}?${params}` : path;
}
