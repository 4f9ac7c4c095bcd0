import { describe, expect, it } from 'vitest';
import { reviewListQuerySchema } from '$lib/schemas/review';
import { pageQuery, readPageQuery } from './page-query';

const at = (search: string): URL => new URL(`https://shop.example/review/installations${search}`);
const read = (search: string) => readPageQuery(reviewListQuerySchema, at(search));
const NOTHING_ASKED = { kind: 'climate', limit: 50 };

describe('the address of a page', () => {
	it('asks for what it says; an empty box asks for nothing', () => {
		expect(read('?verdict=cuts-out&since=&zone=BWh')).toEqual({
			query: { ...NOTHING_ASKED, verdict: 'cuts-out', zone: 'BWh' },
			leftOut: []
		});
	});

	it.each([
		['verdict=perhaps', 'There is no verdict “perhaps”.'],
		['kind=own-ish', 'There is no kind of zone “own-ish”.'],
		['since=spring', 'Fitted since must be a month, such as 2026-03.'],
		['place=here', 'There is no place “here”.'],
		['place=-4', 'There is no place “-4”.'],
		['list=late', 'There is no list “late”.'],
		['zone=!', 'There is no such zone.']
	])('goes without %s, and says so', (part, sentence) => {
		expect(read(`?${part}&sort=oldest`)).toEqual({
			query: { ...NOTHING_ASKED, sort: 'oldest' },
			leftOut: [sentence]
		});
	});

	it('shows no more of a value than a line has room for', () => {
		expect(read(`?verdict=${'y'.repeat(500)}`).leftOut).toEqual([`There is no verdict “${'y'.repeat(40)}”.`]);
	});

	it('is refused in the same words where a file is asked for', async () => {
		const asked = pageQuery(reviewListQuerySchema, at('?verdict=perhaps&since=spring'));
		const message = 'There is no verdict “perhaps”. Fitted since must be a month, such as 2026-03.';
		await expect(asked).rejects.toMatchObject({ status: 422, body: { message } });
	});
});
