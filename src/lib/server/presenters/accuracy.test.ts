import { describe, expect, it } from 'vitest';
import { FEWEST_READINGS } from '$lib/schemas/accuracy';
import {
	CHANCE_EDGES,
	chanceBins,
	daysFigures,
	errorFigures,
	presentAccuracy,
	type CheckSums,
	type CountedChecks
} from './accuracy';

const SUMS: CheckSums = {
	...{ kind: 'label', book: 1, zone: 'BWh', position: 'under-bonnet', isLookedAt: false },
	...{ readings: 0, error: 0, square: 0, inside: 0, oneSided: 0, oneSidedOutside: 0, enteredLater: 0 },
	...{ stated: 0, reported: 0, observedDays: 0 }
};
const sums = (changes: Partial<CheckSums>): CheckSums => ({ ...SUMS, ...changes });
const counted = (changes: Partial<CountedChecks>): CountedChecks => ({
	...{ sums: [], steps: [], chances: [], leftOut: [], waiting: 0, waitingTraces: 0, unheldTraces: 0 },
	books: new Map([[1, 'First']]),
	...changes
});

describe('figures of errors', () => {
	it('add up over books, zones and positions before anything is divided', () => {
		const figures = errorFigures([
			sums({ readings: 8, error: 8, square: 40, inside: 8 }),
			sums({ readings: 2, error: -8, square: 60, inside: 0, book: 2 })
		]);
		expect(figures).toMatchObject({ readings: 10, bias: 0, inside: 8 });
		expect(figures.rootMeanSquare).toBeCloseTo(Math.sqrt(10), 12);
		// Clopper and Pearson for 8 of 10.
		expect(figures.insideShare).toMatchObject({ value: 0.8 });
		expect(figures.insideShare!.low).toBeCloseTo(0.4439, 4);
		expect(figures.insideShare!.high).toBeCloseTo(0.9748, 4);
	});

	it('are none where there are too few to tell, and there are counts all the same', () => {
		const few = errorFigures([sums({ readings: FEWEST_READINGS - 1, error: 9, inside: 1, oneSided: 7 })]);
		expect(few).toMatchObject({ readings: 4, inside: 1, oneSided: 7 });
		expect([few.bias, few.rootMeanSquare, few.insideShare]).toEqual([null, null, null]);
	});
});

describe('figures of cut-outs', () => {
	const YEAR = { readings: 6, observedDays: 6 * 365.25, stated: 12, reported: 3 };

	it('are days a year, and their ratio with its exact interval', () => {
		const figures = daysFigures([sums(YEAR)]);
		expect(figures).toMatchObject({ statedDaysAYear: 2, reportedDaysAYear: 0.5, lookedAt: 0 });
		// Garwood for 3: 0.6187 to 8.7673.
		expect(figures.ratio!.low).toBeCloseTo(0.6187 / 12, 4);
		expect(figures.ratio!.high).toBeCloseTo(8.7673 / 12, 4);
	});

	it('form no ratio of nothing stated, and tell those that somebody looked at apart', () => {
		const figures = daysFigures([sums({ ...YEAR, stated: 0 }), sums({ readings: 2, isLookedAt: true })]);
		expect(figures).toMatchObject({ ratio: null, lookedAt: 2, installations: 8 });
	});
});

describe('bins of a stated chance', () => {
	it('cover all chances without a gap, and hold counts, means and exact intervals', () => {
		const bins = chanceBins([{ bin: 2, installations: 20, chances: 5, wentDark: 0 }]);
		expect(bins.map(({ from }) => from)).toEqual(CHANCE_EDGES.slice(0, -1));
		expect(bins.at(-1)!.to).toBe(1);
		expect(bins[2]).toMatchObject({ installations: 20, statedShare: 0.25, wentDark: 0 });
		// The rule of Clopper and Pearson for 0 of 20.
		expect(bins[2]!.observedShare!.low).toBe(0);
		expect(bins[2]!.observedShare!.high).toBeCloseTo(0.1684, 4);
		expect(bins[0]).toMatchObject({ installations: 0, statedShare: null, observedShare: null });
	});

	it('say nothing of few', () => {
		const [, bin] = chanceBins([{ bin: 1, installations: 4, chances: 0.4, wentDark: 4 }]);
		expect(bin).toMatchObject({ installations: 4, wentDark: 4, observedShare: null });
	});
});

describe('the whole', () => {
	it('has no part for a kind of which nothing was read', () => {
		expect(presentAccuracy(counted({}))).toMatchObject({ temperatures: [], cutOuts: null, capacity: null });
		const { temperatures, capacity } = presentAccuracy(
			counted({ sums: [sums({ kind: 'trace', readings: 1 })], waiting: 1 })
		);
		expect(temperatures.map(({ kind }) => kind)).toEqual(['trace']);
		expect(capacity).toMatchObject({ waiting: 1, all: { readings: 0 } });
	});

	it('names its groups, newest book first, what has no place last, positions in their order', () => {
		const { temperatures } = presentAccuracy(
			counted({
				books: new Map([
					[1, 'First'],
					[12, 'Vans']
				]),
				sums: [
					sums({ readings: 5, error: 5, square: 5, zone: '' }),
					sums({ readings: 1, book: 12, position: 'cabin' }),
					sums({ readings: 2, book: 12, zone: 'Aw', position: 'chassis-rail' })
				]
			})
		);
		const { book, zone, position } = temperatures[0]!.by;
		expect(book.map(({ name, figures }) => [name, figures.readings])).toEqual([
			['12. Vans', 3],
			['1. First', 5]
		]);
		expect(zone.map(({ key }) => key)).toEqual(['Aw', 'BWh', 'none']);
		expect(position.map(({ key }) => key)).toEqual(['under-bonnet', 'cabin', 'chassis-rail']);
		expect(book.map(({ figures }) => figures.bias)).toEqual([null, 1]);
	});
});
