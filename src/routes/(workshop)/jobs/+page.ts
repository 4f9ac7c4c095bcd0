import { fetchJobs, readListQuery } from './list-query';
import type { PageLoad } from './$types';

/** The same way on the server and in the browser: the first page comes with the document, the others by themselves. */
export const load: PageLoad = async ({ data, fetch, url }) => {
	const query = readListQuery(url.searchParams);
	return { ...data, query, list: await fetchJobs(fetch, query) };
};
