import { z } from 'zod';
import { REMEDIES } from '../thermal/outlook';
import { measure, versionSchema } from './fields';

const KEYS = REMEDIES.map(({ key }) => key);

const MOST_MONEY = 100_000;
const amount = (label: string, most: number) =>
	z
		.number({ error: `${label} must be a number.` })
		.min(0, { error: `${label} must be at least 0.` })
		.max(most, { error: `${label} must be at most ${most}.` })
		.meta({ label });

/** What the workshop asks for one remedy, in its own currency. */
export const remedyOfferSchema = z.object({
	key: z.enum(KEYS),
	cost: amount('Cost of the parts', MOST_MONEY),
	hours: measure('Work', 'h', 0, 200),
	offered: z.boolean().meta({ label: 'Offered' })
});

function checkOnceEach(offers: { key: string }[], context: z.RefinementCtx): void {
	const seen = new Set<string>();
	offers.forEach(({ key }, at) => {
		if (seen.has(key)) {
			context.addIssue({ code: 'custom', path: [at, 'key'], message: `${key} stands in the list twice.` });
		}
		seen.add(key);
	});
}

export const remedyListInputSchema = z.object({
	moneyPerHour: amount('An hour of work', MOST_MONEY),
	offers: z.array(remedyOfferSchema).max(KEYS.length).superRefine(checkOnceEach),
	/** Null when no list has been kept yet. */
	version: versionSchema.nullable()
});
export type RemedyListInput = z.infer<typeof remedyListInputSchema>;

export const remedyListSchema = remedyListInputSchema.extend({
	offers: z.array(remedyOfferSchema.extend({ label: z.string(), effect: z.string() }))
});
export type RemedyListView = z.infer<typeof remedyListSchema>;
