import { z } from 'zod';
import { joinWords } from '../format/join-words';
import { versionSchema } from './fields';

/** So long customers' personal data may be kept; "none" keeps them. */
export const RETENTION_YEARS = [2, 3, 5, 7, 10] as const;

/** What cannot be chosen, said with all that can. */
export const NOT_THESE_YEARS = `Choose ${joinWords(RETENTION_YEARS.map(String), 'or')} years, or no limit.`;

const years = z
	.union(
		RETENTION_YEARS.map((each) => z.literal(each)),
		{ error: NOT_THESE_YEARS }
	)
	.nullable();
export const retentionInputSchema = z.object({ years, version: versionSchema });
export type RetentionInput = z.infer<typeof retentionInputSchema>;

/** Somebody whose data are older than the shop means to keep them. */
export const retainedCustomerSchema = z.object({
	id: z.number().int(),
	name: z.string(),
	jobs: z.number().int(),
	lastChangedOn: z.iso.date()
});
export type RetainedCustomer = z.infer<typeof retainedCustomerSchema>;

export const retentionSchema = z.object({
	years,
	/** Of the shop. */
	version: versionSchema,
	/** Whom the years that were asked for would reach today, the oldest first. */
	preview: z.object({
		years,
		total: z.number().int(),
		customers: z.array(retainedCustomerSchema)
	})
});
export type RetentionView = z.infer<typeof retentionSchema>;
