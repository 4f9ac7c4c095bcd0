import { z } from 'zod';
import { REMEDIES } from '../thermal/outlook';
import { moneyAmount, remedyListInputSchema, workHours, type RemedyListInput } from './remedies';

/** The boxes of one remedy. */
export const remedyBoxes = (key: string) =>
	({ cost: `${key}Cost`, hours: `${key}Hours`, offered: `${key}Offered` }) as const;

const { moneyPerHour, version } = remedyListInputSchema.shape;

// Every label has the name of its remedy, so that what is wrong says with which.
const boxes = REMEDIES.flatMap(({ key, label }): [string, z.ZodType][] => {
	const box = remedyBoxes(key);
	return [
		[box.cost, moneyAmount(`${label}, parts`)],
		[box.hours, workHours(`${label}, work`)],
		[box.offered, z.boolean().meta({ label: `${label}, offered` })]
	];
});

/** The list of remedies as its form has it: three boxes for each. */
export const remedyFormSchema = z.object({ moneyPerHour, ...Object.fromEntries(boxes), version });
export type RemedyForm = Pick<RemedyListInput, 'moneyPerHour' | 'version'> & Record<string, unknown>;

export function toRemedyForm({ moneyPerHour, offers, version }: RemedyListInput): RemedyForm {
	const values = offers.flatMap((offer) => {
		const box = remedyBoxes(offer.key);
		return [
			[box.cost, offer.cost],
			[box.hours, offer.hours],
			[box.offered, offer.offered]
		];
	});
	return { moneyPerHour, ...Object.fromEntries(values), version };
}

export function fromRemedyForm({ moneyPerHour, version, ...form }: RemedyForm): RemedyListInput {
	const offers = REMEDIES.map(({ key }) => {
		const box = remedyBoxes(key);
		return { key, cost: form[box.cost], hours: form[box.hours], offered: form[box.offered] };
	});
	return remedyListInputSchema.parse({ moneyPerHour, offers, version });
}
