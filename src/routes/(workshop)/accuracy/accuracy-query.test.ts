import { describe, expect, it } from 'vitest';
import type { Accuracy } from '$lib/schemas/accuracy';
import { listChoices, readingsHref, toList } from './accuracy-query';

const EMPTY: Accuracy = {
	fewest: 5,
	temperatures: [],
	cutOuts: null,
	capacity: null,
	leftOut: [],
	waitingTraces: 0,
	unheldTraces: 0
};
const group = (key: string, name: string) => ({ key, name, figures: {} as never });

describe('the address of the list', () => {
	it('leaves out what is not set, and what is shown anyway', () => {
		expect(readingsHref({ kind: 'label', zone: '', show: 'counted', cursor: '' })).toBe(
			'/accuracy?kind=label'
		);
		expect(toList({ book: 2, show: 'left-out' })).toBe('/accuracy?book=2&show=left-out#readings');
		expect(readingsHref({})).toBe('/accuracy');
	});
});

describe('what there is to choose from', () => {
	it('is what occurs, each once', () => {
		const by = { book: [group('1', '1. First')], zone: [group('Aw', 'Hot')], position: [] };
		const all = {} as never;
		const { kinds, by: choices } = listChoices({
			...EMPTY,
			temperatures: [{ kind: 'label', all, by, steps: [] }],
			cutOuts: { all, lookedAt: all, by: { ...by, zone: [group('BWh', 'Desert')] }, chances: [] },
			capacity: { all, by: { book: [], zone: [], position: [] }, waiting: 2 }
		});
		expect(kinds).toEqual(['label', 'cut-out']);
		expect(choices.book).toEqual([{ value: '1', label: '1. First' }]);
		expect(choices.zone.map(({ value }) => value)).toEqual(['Aw', 'BWh']);
	});

	it('is nothing in a new shop', () => {
		expect(listChoices(EMPTY).kinds).toEqual([]);
	});
});
