import { describe, expect, it } from 'vitest';
import {
	clopperPearsonInterval,
	jeffreysInterval,
	poissonInterval,
	poissonRatioInterval,
	wilsonInterval,
	type Interval
} from '../../src/lib/thermal/statistics';
import { checkAgainst, type PublishedValue } from './support/check-against';

const LEVEL = 0.95;

function checkInterval(
	published: Omit<PublishedValue, 'expected'>,
	limits: [number, number],
	find: () => Interval
) {
	const { name } = published;
	checkAgainst({ ...published, name: `${name}, lower`, expected: limits[0] }, () => find().low);
	checkAgainst({ ...published, name: `${name}, upper`, expected: limits[1] }, () => find().high);
}

describe('intervals for a proportion', () => {
	/** Events, trials, then Wilson's limits and those of Clopper and Pearson. */
	const NEWCOMBE: [number, number, [number, number], [number, number]][] = [
		[81, 263, [0.2553, 0.3662], [0.2527, 0.3676]],
		[15, 148, [0.0624, 0.1605], [0.0578, 0.1617]],
		[0, 20, [0, 0.1611], [0, 0.1684]],
		[1, 29, [0.0061, 0.1718], [0.0009, 0.1776]]
	];
	const from = {
		source: 'Newcombe, Statist. Med. 17 (1998) 857',
		place: 'Table I',
		standing: 'from memory' as const,
		unit: '',
		tolerance: { absolute: 0.00005001 },
		because: 'half a unit of the last digit printed'
	};

	for (const [events, trials, wilson, exact] of NEWCOMBE) {
		const of = `${events} of ${trials}`;
		checkInterval({ name: `Wilson interval for ${of}`, ...from }, wilson, () =>
			wilsonInterval(events, trials, LEVEL)
		);
		checkInterval({ name: `Clopper-Pearson interval for ${of}`, ...from }, exact, () =>
			clopperPearsonInterval(events, trials, LEVEL)
		);
	}
});

describe("Jeffreys' interval", () => {
	const from = {
		source: 'Brown, Cai and DasGupta, Statistical Science 16 (2001) 101',
		place: 'section 3.1, worked with SciPy',
		standing: 'worked from the published equation' as const,
		unit: '',
		tolerance: { relative: 1e-9 },
		because: 'both invert the same function'
	};
	checkInterval(
		{ name: 'Jeffreys interval for 81 of 263', ...from },
		[0.2545219349910236, 0.36564749917408246],
		() => jeffreysInterval(81, 263, LEVEL)
	);
	checkInterval({ name: 'Jeffreys interval for 0 of 20', ...from }, [0, 0.11663898290487539], () =>
		jeffreysInterval(0, 20, LEVEL)
	);
	checkInterval(
		{ name: 'Jeffreys interval for 23 of 60', ...from },
		[0.26814604342601006, 0.509476192507333],
		() => jeffreysInterval(23, 60, LEVEL)
	);
});

describe('intervals for a count', () => {
	const GARWOOD: [number, [number, number]][] = [
		[0, [0, 3.69]],
		[1, [0.0253, 5.57]],
		[2, [0.242, 7.22]],
		[3, [0.619, 8.77]],
		[5, [1.62, 11.67]],
		[10, [4.8, 18.39]],
		[20, [12.22, 30.89]],
		[50, [37.11, 65.92]]
	];
	for (const [events, limits] of GARWOOD) {
		checkInterval(
			{
				name: `Poisson interval for ${events} events`,
				source:
					'Garwood, Biometrika 28 (1936) 437; Pearson and Hartley, Biometrika Tables, 3rd ed., Table 40',
				place: '95 % two-sided',
				standing: 'from memory',
				unit: 'events',
				tolerance: { absolute: 0.00501 },
				because: 'half a unit of the last digit remembered'
			},
			limits,
			() => poissonInterval(events, LEVEL)
		);
	}
	// The factors by which a ratio of counted to expected is multiplied for its limits are tabled by the count alone.
	const FACTORS: [number, [number, number]][] = [
		[1, [0.0253, 5.57]],
		[10, [0.48, 1.84]],
		[20, [0.611, 1.54]],
		[50, [0.742, 1.32]]
	];
	for (const [events, factors] of FACTORS) {
		checkInterval(
			{
				name: `Poisson interval for a ratio, ${events} counted where as many were expected`,
				source: 'Breslow and Day, Statistical Methods in Cancer Research II (IARC, 1987), Table 2.10',
				place: '95 % two-sided',
				standing: 'from memory',
				unit: '',
				tolerance: { absolute: 0.00501 },
				because: 'half a unit of the last digit remembered'
			},
			factors,
			() => poissonRatioInterval(events, events, LEVEL)
		);
	}
});

/** How often an interval holds the true chance, summed over all outcomes. */
function coverage(
	find: (events: number, trials: number, level: number) => Interval,
	trials: number,
	chance: number
) {
	let covered = 0;
	let probability = (1 - chance) ** trials;
	for (let events = 0; events <= trials; events++) {
		const { low, high } = find(events, trials, LEVEL);
		if (low <= chance && chance <= high) covered += probability;
		probability *= ((trials - events) / (events + 1)) * (chance / (1 - chance));
	}
	return covered;
}

describe('intervals keep their promise', () => {
	const CHANCES = [0.02, 0.1, 0.25, 0.5, 0.83];

	it.each(CHANCES)('at a chance of %f over 40 trials', (chance) => {
		expect(coverage(clopperPearsonInterval, 40, chance)).toBeGreaterThanOrEqual(LEVEL);
		expect(Math.abs(coverage(wilsonInterval, 40, chance) - LEVEL)).toBeLessThan(0.035);
		expect(Math.abs(coverage(jeffreysInterval, 40, chance) - LEVEL)).toBeLessThan(0.035);
	});

	it('turn with the outcome: failures mirror successes', () => {
		for (const find of [wilsonInterval, clopperPearsonInterval, jeffreysInterval]) {
			const [some, others] = [find(3, 17, 0.9), find(14, 17, 0.9)];
			expect(some.low).toBeCloseTo(1 - others.high, 12);
			expect(some.high).toBeCloseTo(1 - others.low, 12);
		}
	});

	it('grow with the confidence and hold what was seen', () => {
		const [narrow, wide] = [poissonInterval(7, 0.8), poissonInterval(7, 0.99)];
		expect(wide.low).toBeLessThan(narrow.low);
		expect(narrow.low).toBeLessThan(7);
		expect(narrow.high).toBeGreaterThan(7);
		expect(wide.high).toBeGreaterThan(narrow.high);
	});

	it('are refused for counts that cannot be', () => {
		expect(() => wilsonInterval(3, 2, LEVEL)).toThrow(
			'events is 3: it must be a whole number within 0 to 2.'
		);
		expect(() => clopperPearsonInterval(0.5, 2, LEVEL)).toThrow('events is 0.5');
		expect(() => jeffreysInterval(0, 0, LEVEL)).toThrow('trials is 0');
		expect(() => wilsonInterval(1, 2, 1)).toThrow('confidence is 1');
		expect(() => poissonInterval(-1, LEVEL)).toThrow('events is -1');
		expect(() => poissonInterval(1.5, LEVEL)).toThrow(
			'events is 1.5: it must be a whole number within 0 to 1000000.'
		);
	});
});
