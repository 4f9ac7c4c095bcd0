import type { Against, RecommendationView } from '../schemas/recommendations';
import { formatDate } from './dates';
import { sayVerdict } from './verdict';

const MAKER_FORBIDS = 'the battery’s maker does not allow it under the bonnet';

/** In spite of what it goes ahead, after "although"; nothing where it goes against nothing. */
export function sayAgainst(
	{ againstVerdict, againstMaker }: Against,
	{ verdict, chemistry }: Pick<RecommendationView['assessment'], 'verdict' | 'chemistry'>
): string {
	return [
		...(againstVerdict ? [`it ${sayVerdict(verdict, chemistry)}`] : []),
		...(againstMaker ? [MAKER_FORBIDS] : [])
	].join(' and ');
}

/** The same as a name: "the verdict and the maker’s word". */
export const nameAgainst = ({ againstVerdict, againstMaker }: Against): string =>
	[...(againstVerdict ? ['the verdict'] : []), ...(againstMaker ? ['the maker’s word'] : [])].join(' and ');

/** That a later one was made; nothing while none has been. */
export function sayReplaced({
	replacedBy,
	isFittedUnder
}: Pick<RecommendationView, 'replacedBy' | 'isFittedUnder'>): string {
	if (!replacedBy) return '';
	const { number, recommendedBy, createdAt } = replacedBy;
	const later = `recommendation ${number} on ${formatDate(createdAt)}, by ${recommendedBy}`;
	return isFittedUnder
		? `What was fitted is held against this one; later came ${later}.`
		: `Replaced by ${later}.`;
}

const plainName = (name: string): string => name.normalize('NFC').trim().replace(/\s+/g, ' ').toLowerCase();

/** Who entered a decision, where that is somebody else than the one who took it. */
export const findEntrant = (decidedBy: string, recommendedBy: string): string | null =>
	plainName(decidedBy) === plainName(recommendedBy) ? null : recommendedBy;

/** Who decided: "Ilse Tarn, entered by Odo Marsh". */
export function sayDecider({
	decidedBy,
	recommendedBy
}: Pick<RecommendationView, 'decidedBy' | 'recommendedBy'>): string {
	const entrant = findEntrant(decidedBy ?? '', recommendedBy);
	return `${decidedBy}${entrant ? `, entered by ${entrant}` : ''}`;
}
