import { JOB_SORTS, type JobPage, type JobQuery, type JobSort } from '$lib/schemas/jobs';

/** What the address of the list says, as it stands there; the API checks it. */
export type ListQuery = Partial<Record<'search' | 'verdict' | 'stage' | 'zone' | 'sort' | 'cursor', string>>;

const KEYS = ['search', 'verdict', 'stage', 'zone', 'sort', 'cursor'] as const satisfies (keyof JobQuery)[];
const FILTERS = ['search', 'verdict', 'stage', 'zone'] as const;
export const FIRST_SORT: JobSort = 'newest';

/** A form without a script sends every box, also those that were left alone. */
export function readListQuery(params: URLSearchParams): ListQuery {
	const query: ListQuery = {};
	for (const key of KEYS) {
		const value = params.get(key)?.trim();
		if (value && !(key === 'sort' && value === FIRST_SORT)) query[key] = value;
	}
	return query;
}

const queryText = (query: ListQuery): string => {
	const params = new URLSearchParams(Object.entries(query).filter(([, value]) => value !== ''));
	return params.size > 0 ? `?${params}` : '';
};

export const listHref = (query: ListQuery): string => `/jobs${queryText(query)}`;
export const apiHref = (query: ListQuery): string => `/api/v1/jobs${queryText(query)}`;

/** The same list asked for otherwise: it begins at its first page again. */
export function changeQuery(query: ListQuery, changes: ListQuery): ListQuery {
	const { cursor: _ended, ...rest } = { ...query, ...changes };
	return readListQuery(new URLSearchParams(Object.entries(rest)));
}

export const isFiltered = (query: ListQuery): boolean => FILTERS.some((key) => query[key]);

/** A column's heading leads to the list ordered by it, and from there to the same upside down. */
export interface ColumnSort {
	first: JobSort;
	second: JobSort;
	/** Which way the first of the two runs. */
	runs: 'up' | 'down';
}

export function sortColumn(query: ListQuery, { first, second, runs }: ColumnSort) {
	const sort = (JOB_SORTS as readonly string[]).includes(query.sort ?? '') ? query.sort : FIRST_SORT;
	const other = runs === 'up' ? 'down' : 'up';
	const sorted = sort === first ? runs : sort === second ? other : undefined;
	return {
		sortHref: listHref(changeQuery(query, { sort: sort === first ? second : first })),
		...(sorted ? { sorted: sorted as 'up' | 'down' } : {})
	};
}

export type JobList = { page: JobPage } | { problem: { title: string; text: string; id?: string } };

const NO_ANSWER = {
	title: 'The workshop’s server does not answer',
	text: 'Look whether this device has a connection, then try again.'
};

/** One page of the list from the API; trouble is given back in words, so that the filter stays on the page. */
export async function fetchJobs(fetchFrom: typeof fetch, query: ListQuery): Promise<JobList> {
	const response = await fetchFrom(apiHref(query)).catch(() => null);
	if (!response) return { problem: NO_ANSWER };
	const body = (await response.json().catch(() => null)) as unknown;
	if (response.ok && body) return { page: body as JobPage };
	const { detail, id } = (body ?? {}) as { detail?: string; id?: string };
	const isAsked = response.status < 500;
	return {
		problem: {
			title: isAsked ? 'The list cannot be shown like that' : 'The list cannot be shown just now',
			text: detail ?? NO_ANSWER.text,
			...(id && !isAsked ? { id } : {})
		}
	};
}
