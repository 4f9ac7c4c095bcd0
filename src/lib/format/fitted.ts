import { NOT_PROPOSED, type AgreedItem, type Difference } from '../schemas/fitting';
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
