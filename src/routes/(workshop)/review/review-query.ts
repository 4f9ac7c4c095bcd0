/** What the pages of the review have in common in their addresses. */
export type ReviewParams = Partial<
	Record<
		'kind' | 'zone' | 'place' | 'verdict' | 'since' | 'until' | 'list' | 'sort' | 'cursor',
		string | number
	>
>;

/** The address of a page of the review; what is not set, and the usual kind of zone, is left out. */
export function reviewHref(path: string, params: ReviewParams): string {
	const given = Object.entries(params).filter(
		([name, value]) => value !== undefined && value !== '' && !(name === 'kind' && value === 'climate')
	);
	const query = new URLSearchParams(given.map(([name, value]) => [name, String(value)]));
	return query.size > 0 ? `${path}?${query}` : path;
}

/** The filter goes along from page to page; where one looks within it does not. */
export const keepFilter = ({ kind, verdict, since, until }: ReviewParams): ReviewParams => ({
	kind,
	verdict,
	since,
	until
});

const MONTHS_A_YEAR = 12;

/** The month so many before a day's own, as "2026-03". */
export function monthBack(day: string, months: number): string {
	const index = Number(day.slice(0, 4)) * MONTHS_A_YEAR + Number(day.slice(5, 7)) - 1 - months;
	return `${Math.floor(index / MONTHS_A_YEAR)}-${String((index % MONTHS_A_YEAR) + 1).padStart(2, '0')}`;
}
