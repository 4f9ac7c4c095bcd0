import { describe, expect, it } from 'vitest';
import { changeQuery, fetchJobs, isFiltered, listHref, readListQuery, sortColumn } from './list-query';

const read = (text: string) => readListQuery(new URLSearchParams(text));
const BY_NUMBER = { first: 'highest-number', second: 'lowest-number', runs: 'down' } as const;

describe('the address of the list of jobs', () => {
	it('says nothing of boxes that were left alone, nor of what is usual', () => {
		expect(read('search=&verdict=&zone=BWh&sort=newest&page=7')).toEqual({ zone: 'BWh' });
	});

	it('goes there and back', () => {
		const query = { search: 'ana & ben', verdict: 'cuts-out', sort: 'oldest' };
		expect(read(listHref(query).split('?')[1] ?? '')).toEqual(query);
		expect(listHref({})).toBe('/jobs');
	});

	it('begins at the first page when anything else changes', () => {
		expect(changeQuery({ zone: 'Aw', cursor: 'abc' }, { verdict: 'runs-close' })).toEqual({
			zone: 'Aw',
			verdict: 'runs-close'
		});
		expect(changeQuery({ zone: 'Aw', cursor: 'abc' }, { zone: '' })).toEqual({});
	});

	it('knows a filter from an order', () => {
		expect(isFiltered({ sort: 'oldest', cursor: 'abc' })).toBe(false);
		expect(isFiltered({ search: 'ana' })).toBe(true);
	});
});

describe('the heading of a column', () => {
	it('orders by it, then the other way round', () => {
		expect(sortColumn({ zone: 'Aw' }, BY_NUMBER)).toEqual({ sortHref: '/jobs?zone=Aw&sort=highest-number' });
		expect(sortColumn({ sort: 'highest-number' }, BY_NUMBER)).toEqual({
			sortHref: '/jobs?sort=lowest-number',
			sorted: 'down'
		});
		expect(sortColumn({ sort: 'lowest-number' }, BY_NUMBER)).toEqual({
			sortHref: '/jobs?sort=highest-number',
			sorted: 'up'
		});
	});
});

describe('fetching the list', () => {
	const answer = (status: number, body: unknown) => () =>
		Promise.resolve(new Response(JSON.stringify(body), { status }));

	it('gives the page', async () => {
		const page = { rows: [], total: 0, next: null };
		expect(await fetchJobs(answer(200, page), {})).toEqual({ page });
	});

	it('gives what was wrong with the question in the words of the API', async () => {
		const list = await fetchJobs(answer(422, { detail: 'verdict: no such verdict', id: '7' }), {});
		expect(list).toMatchObject({ problem: { text: 'verdict: no such verdict' } });
		expect(list).not.toHaveProperty('problem.id');
	});

	it('gives the number of a fault of ours', async () => {
		const list = await fetchJobs(answer(500, { detail: 'Something went wrong.', id: '7' }), {});
		expect(list).toMatchObject({ problem: { text: 'Something went wrong.', id: '7' } });
	});

	it('says so when nothing answers', async () => {
		const list = await fetchJobs(() => Promise.reject(new TypeError('offline')), {});
		expect(list).toMatchObject({ problem: { title: 'The workshop’s server does not answer' } });
	});
});
