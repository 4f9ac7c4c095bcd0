import { formatNumber } from '$lib/format/numbers';
import { sayVerdict } from '$lib/format/verdict';
import { hasBms } from '$lib/schemas/batteries';
import type { Range } from '$lib/schemas/outlook-reports';
import type { Verdict } from '$lib/schemas/verdicts';

/** What happens to a battery that is too hot: electronics of its own switch it off, or nothing does. */
export interface EventWords {
	/** After "on about 3 of 20 days like this". */
	happens: string;
	/** For a table: "Dark on days like this". */
	adjective: string;
	days: string;
	sayVerdict: (verdict: Verdict) => string;
}

type Happening = Omit<EventWords, 'sayVerdict'>;

const SWITCHED_OFF: Happening = {
	happens: 'the battery goes dark',
	adjective: 'dark',
	days: 'Cut-out days a year'
};
const NOT_SWITCHED_OFF: Happening = {
	happens: 'the battery gets hotter than it may',
	adjective: 'too hot',
	days: 'Days too hot in a year'
};

export const eventWordsOf = (chemistry: string): EventWords => ({
	...(hasBms(chemistry) ? SWITCHED_OFF : NOT_SWITCHED_OFF),
	sayVerdict: (verdict) => sayVerdict(verdict, chemistry)
});

const TWENTY = 20;

/** "about 11 of 20"; the ends are never called never or always. */
export function sayOfTwenty(share: number): string {
	const days = Math.round(TWENTY * share);
	if (days === 0) return 'fewer than 1 of 20';
	return days === TWENTY ? 'nearly all' : `about ${days} of 20`;
}

/** "On about 11 of 20 days like this". */
export const sayDaysLikeThis = (share: number): string => `On ${sayOfTwenty(share)} days like this`;

/** A count of days: "9 (4 to 16)", "fewer than 1". */
export function formatDays({ low, middle, high }: Range): string {
	const [least, most] = [formatNumber(low), formatNumber(high)];
	const value = middle < 0.5 ? 'fewer than 1' : formatNumber(middle);
	return least === most && (value === least || least === '0') ? value : `${value} (${least} to ${most})`;
}

/** The same as it stands in a sentence: "9 (4 to 16) days", "fewer than 1 day". */
export function sayDayCount(range: Range): string {
	const days = formatDays(range);
	return days === '1' || days === 'fewer than 1' ? `${days} day` : `${days} days`;
}

/** The same with a decimal, for a month. */
export function formatMonthDays({ low, middle, high }: Range): string {
	const [least, value, most] = [low, middle, high].map((days) => formatNumber(days, 1));
	return most === '0.0' && value === '0.0' ? 'none' : `${value} (${least} to ${most})`;
}

const SHARES: readonly [below: number, words: string][] = [
	[0.03, 'next to nothing'],
	[0.075, 'about a twentieth'],
	[0.15, 'about a tenth'],
	[0.225, 'about a fifth'],
	[0.29, 'about a quarter'],
	[0.42, 'about a third'],
	[0.58, 'about half'],
	[0.7, 'about two thirds'],
	[0.85, 'about three quarters']
];

/** A share as people say it: "about a third". */
export const sayShare = (share: number): string =>
	SHARES.find(([below]) => share < below)?.[1] ?? 'nearly all';

/** The first letter small, so that a name can stand inside a sentence. */
export const small = (words: string): string => `${words.charAt(0).toLowerCase()}${words.slice(1)}`;

/** Two counts that are this close are called alike. */
const ALIKE_SHARE = 0.05;

/** How a count of days changed, by no more than what is shown of both: what reads alike is alike. */
export function compareDays(was: Range, is: Range): 'fewer' | 'more' | 'alike' {
	const isAlike =
		sayDayCount(was) === sayDayCount(is) || Math.abs(is.middle - was.middle) <= was.middle * ALIKE_SHARE;
	if (isAlike) return 'alike';
	return is.middle < was.middle ? 'fewer' : 'more';
}
