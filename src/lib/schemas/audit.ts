import { z } from 'zod';
import { idSchema } from './fields';

const AUDIT_PAGE = 50;
const day = (label: string) =>
	z.iso.date({ error: `${label} must be a day, such as 2026-03-04.` }).optional();

const auditFields = z.object({
	person: idSchema.optional().meta({ description: 'Who did it' }),
	action: z
		.string()
		.regex(/^[a-z0-9.-]{1,60}$/, { error: 'This is no action of the trail.' })
		.optional(),
	subject: z
		.string()
		.regex(/^[a-z-]{1,30}$/, { error: 'This is no subject of the trail.' })
		.optional()
		.meta({ description: 'What it was done to: job, mount, person …' }),
	words: z
		.string()
		.trim()
		.max(80, { error: 'Search for 80 characters or fewer.' })
		.default('')
		.meta({ description: 'Parts of what was recorded, of a name, or the number of a subject' }),
	from: day('From'),
	to: day('To'),
	cursor: z.string().max(1_200).optional().meta({ description: 'Where the page before ended' }),
	limit: z.coerce.number().int().min(1).max(100).default(AUDIT_PAGE)
});
export const auditQuerySchema = auditFields.superRefine(({ from, to }, { addIssue }) => {
	if (from === undefined || to === undefined || from <= to) return;
	addIssue({ code: 'custom', path: ['to'], message: `To must be ${from} or later, as From is.` });
});
export type AuditQuery = z.infer<typeof auditQuerySchema>;

export const auditRowSchema = z.object({
	/** Counts up in each workshop. */
	sequence: z.number().int(),
	at: z.iso.datetime(),
	/** "a customer or the program" where nobody was signed in. */
	who: z.string(),
	action: z.string(),
	/** The action in plain words. */
	did: z.string(),
	subject: z.string(),
	subjectId: z.number().int(),
	/** What the workshop knows it by: of a book and a job its own number. */
	subjectNumber: z.number().int(),
	/** Of a person or a customer. */
	subjectName: z.string().nullable(),
	/** The page of the subject, where it has one. */
	href: z.string().nullable(),
	/** What was recorded beside it, in words. */
	detail: z.array(z.object({ label: z.string(), value: z.string() }))
});
export type AuditRow = z.infer<typeof auditRowSchema>;

export const auditPageSchema = z.object({
	rows: z.array(auditRowSchema),
	total: z.number().int(),
	next: z.string().nullable()
});
export type AuditPage = z.infer<typeof auditPageSchema>;

/** What can be chosen above the list: what the trail really holds. */
export interface AuditChoices {
	people: { id: number; name: string }[];
	actions: { key: string; label: string }[];
	subjects: string[];
}

export const auditCheckSchema = z.object({
	checkedAt: z.iso.datetime(),
	entries: z.number().int(),
	/** Null when it was whole. */
	finding: z.string().nullable()
});
export type AuditCheckView = z.infer<typeof auditCheckSchema>;
