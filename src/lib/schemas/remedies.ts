import { z } from 'zod';
import { REMEDIES } from '../thermal/outlook';
import { measure, versionSchema } from './fields';

const KEYS = REMEDIES.map(({ key }) => key);

const MOST_MONEY = 100_000;
export const moneyAmount = (label: string) => {
	const error = `${label} must be a number from 0 to ${MOST_MONEY}.`;
	return z.number({ error }).min(0, { error }).max(MOST_MONEY, { error }).meta({ label });
};
export const workHours = (label: string) => measure(label, 'h', 0, 200);

/** What the workshop asks for one remedy, in its own currency. */
export const remedyOfferSchema = z.object({
	key: z.enum(KEYS),
	cost: moneyAmount('Cost of the parts'),
	hours: workHours('Work'),
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
	moneyPerHour: moneyAmount('An hour of work'),
	offers: z.array(remedyOfferSchema).max(KEYS.length).superRefine(checkOnceEach),
	/** Null when no list has been kept yet. */
	version: versionSchema.nullable()
});
export type RemedyListInput = z.infer<typeof remedyListInputSchema>;

export const remedyListSchema = remedyListInputSchema.extend({
	offers: z.array(remedyOfferSchema.extend({ label: z.string(), effect: z.string() }))
});
export type RemedyListView = z.infer<typeof remedyListSchema>;
