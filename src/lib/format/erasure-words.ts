import type { WaitingErasures } from '../schemas/erasures';
import { formatDate } from './dates';

/** "2 requests wait, the oldest since 4 March 2026"; nothing where none does. */
export function sayWaiting({ count, oldestAt }: WaitingErasures): string {
	if (count === 0 || oldestAt === null) return '';
	const since = formatDate(oldestAt);
	return count === 1
		? `One request waits, since ${since}`
		: `${count} requests wait, the oldest since ${since}`;
}
