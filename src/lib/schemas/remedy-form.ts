import { z } from 'zod';
import { REMEDIES } from '../thermal/outlook';
import { remedyListInputSchema, remedyOfferSchema, type RemedyListInput } from './remedies';

/** The boxes of one remedy. */
export const remedyBoxes = (key: string) =>
	({ cost: `${key}Cost`, hours: `${key}Hours`, offered: `${key}Offered` }) as const;

const { cost, hours, offered } = remedyOfferSchema.shape;
const { moneyPerHour, version } = remedyListInputSchema.shape;

/** A field of an offer under the name of its remedy, so that what is wrong says with which. */
function named<T extends z.ZodType>(field: T, remedy: string, what: string): T {
	return field.meta({ ...field.meta(), label: `${remedy}, ${what}` });
}

const boxes = REMEDIES.flatMap(({ key, label }): [string, z.ZodType][] => {
	const box = remedyBoxes(key);
	return [
		[box.cost, named(cost, label, 'parts')],
		[box.hours, named(hours, label, 'work')],
		[box.offered, named(offered, label, 'offered')]
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
