import { NOT_PROPOSED, type AgreedItem, type Difference, type FittedKey } from '../schemas/fitting';
import { earliestDayOf, formatDate } from './dates';
import { joinWords } from './join-words';

/** Nothing was proposed for it, and nobody noted what was fitted. */
export const isNotNoted = ({ key, agreed }: AgreedItem, differences: readonly Difference[]): boolean =>
	agreed === NOT_PROPOSED && !differences.some((difference) => difference.key === key);

function sayDifferences(count: number): string {
	if (count === 0) return 'Fitted as agreed.';
	return `${count === 1 ? 'One thing is' : `${count} things are`} not as agreed.`;
}

/** "Fitted as agreed. Not proposed and not noted: cable and fuse." */
export function sayFitted(agreed: readonly AgreedItem[], differences: readonly Difference[]): string {
	const open = agreed.filter((item) => isNotNoted(item, differences)).map(({ label }) => label.toLowerCase());
	const what = sayDifferences(differences.length);
	return open.length === 0 ? what : `${what} Not proposed and not noted: ${joinWords(open)}.`;
}

/** What is odd about a day of fitting that lies before anything was agreed; empty where nothing is. */
export function sayTooEarly(fittedOn: string, agreedAt: string): string {
	if (fittedOn >= earliestDayOf(agreedAt)) return '';
	return `That is before it was recommended, on ${formatDate(agreedAt)}. If the day is a slip, change it below and keep it again.`;
}

/** What the heat depends on: a cable or a fuse of another kind leaves the estimate as good as it was. */
export const HEAT_KEYS: readonly FittedKey[] = ['battery', 'position', 'shield', 'charger'];

/** One of these, as it was agreed and as it was fitted. */
export interface HeatDifference extends Difference {
	label: string;
	agreed: string;
}

/** What was fitted otherwise than the estimate knows it. */
export const listHeatDifferences = ({
	agreed,
	differences
}: {
	agreed: readonly AgreedItem[];
	differences: readonly Difference[];
}): HeatDifference[] =>
	differences
		.filter(({ key }) => HEAT_KEYS.includes(key))
		.map(({ key, fitted }) => {
			const item = agreed.find((each) => each.key === key);
			return { key, fitted, label: item?.label ?? key, agreed: item?.agreed ?? '' };
		});

/** "battery: Ridge 65; shield: none" */
export const sayHeatDifferences = (
	differences: readonly Pick<HeatDifference, 'label' | 'fitted'>[]
): string => differences.map(({ label, fitted }) => `${label.toLowerCase()}: ${fitted}`).join('; ');
