import {
	FITTED_KEYS,
	MOST_FITTED_CHARACTERS,
	NOT_PROPOSED,
	type AgreedItem,
	type Difference
} from '../schemas/fitting';

export const NOT_NOTED = 'not noted';

const plain = (words: string): string => words.normalize('NFC').trim().replace(/\s+/g, ' ').toLowerCase();

function isAsAgreed(fitted: string, agreed: string): boolean {
	return plain(fitted) === plain(agreed) || (fitted === NOT_NOTED && agreed === NOT_PROPOSED);
}

/** What was fitted of something that nobody had named: what was agreed then. The place of a mount is always its own. */
function fittedAsAgreed(before: AgreedItem | undefined): string | null {
	if (!before || before.key === 'position') return null;
	return before.agreed === NOT_PROPOSED ? NOT_NOTED : before.agreed;
}

/**
 * What is otherwise once another agreement holds. What was named stays named, unless that very thing is what is agreed
 * now; what was as agreed before is otherwise where the agreement changed.
 */
export function compareAnew(
	before: readonly AgreedItem[],
	now: readonly AgreedItem[],
	differences: readonly Difference[]
): Difference[] {
	return FITTED_KEYS.flatMap((key) => {
		const agreed = now.find((item) => item.key === key)?.agreed ?? '';
		const named = differences.find((difference) => difference.key === key)?.fitted;
		const fitted = named ?? fittedAsAgreed(before.find((item) => item.key === key));
		if (fitted === null || isAsAgreed(fitted, agreed)) return [];
		return [{ key, fitted: fitted.slice(0, MOST_FITTED_CHARACTERS) }];
	});
}
