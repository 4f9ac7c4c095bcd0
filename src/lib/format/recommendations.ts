import type { RecommendationView } from '../schemas/recommendations';
import { formatDate } from './dates';

/** That a later one was made; nothing while none has been. What a battery was fitted under stays with it. */
export function sayReplaced({
	replacedBy,
	isFittedUnder
}: Pick<RecommendationView, 'replacedBy' | 'isFittedUnder'>): string {
	if (!replacedBy) return '';
	const { id, recommendedBy, createdAt } = replacedBy;
	const later = `recommendation ${id} on ${formatDate(createdAt)}, by ${recommendedBy}`;
	return isFittedUnder
		? `The battery was fitted under this one; later came ${later}.`
		: `Replaced by ${later}.`;
}
