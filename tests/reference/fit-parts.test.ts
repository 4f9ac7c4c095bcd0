import { describe, expect, it } from 'vitest';
import { defaultScenario, ambientTempC } from '../../src/lib/thermal';
import { countPerIndependent } from '../../src/lib/thermal/fit/autocorrelation';
import { condenseCourse } from '../../src/lib/thermal/fit/condense-course';
import { LOSSES, type LossName } from '../../src/lib/thermal/fit/robust-loss';
import { invertPositive, multiply } from '../../src/lib/thermal/fit/small-matrices';
import { studentReach } from '../../src/lib/thermal/fit/student';
import { normalCdf } from '../../src/lib/thermal/statistics';
import { normalNumber } from '../support/invent-trace';
import { checkAgainst } from './support/check-against';

describe("Student's distribution", () => {
	const from = {
		source: 'NIST/SEMATECH e-Handbook of Statistical Methods',
		place: 'table 1.3.6.7.2, share 0.95 on one side',
		standing: 'from memory' as const,
		unit: '',
		tolerance: { absolute: 5.1e-4 },
		because: 'the table has three decimals'
	};
	const TABLE = [
		[1, 6.314],
		[2, 2.92],
		[5, 2.015],
		[10, 1.812],
		[30, 1.697],
		[100, 1.66]
	] as const;
	TABLE.forEach(([degrees, expected]) =>
		checkAgainst({ ...from, name: `Student's reach of 90 %, ${degrees} degrees of freedom`, expected }, () =>
			studentReach(0.9, degrees)
		)
	);
	it('is the normal one when much is known', () => {
		expect(studentReach(0.9, 1e9)).toBeCloseTo(1.644854, 4);
	});
});

describe('losses', () => {
	const names = Object.keys(LOSSES) as LossName[];
	/** Mean over a standard normal number, by the middle rule. */
	const meanOf = (of: (u: number) => number): number => {
		let sum = 0;
		for (let u = -8; u < 8; u += 0.001) sum += of(u + 0.0005) * (normalCdf(u + 0.001) - normalCdf(u));
		return sum;
	};
	checkAgainst(
		{
			name: "efficiency of Huber's loss at 1.345 on normal residuals",
			source: 'Huber, Robust Statistics (1981); Holland and Welsch, Commun. Statist. A 6 (1977) 813',
			place: 'the scale for which the efficiency is 95 %',
			standing: 'from memory',
			expected: 0.95,
			unit: '',
			tolerance: { absolute: 5e-4 },
			because: 'the scale is given to four digits'
		},
		() => meanOf(LOSSES.huber.pullSlope) ** 2 / meanOf((u) => LOSSES.huber.pull(u) ** 2)
	);

	it.each(names)(
		'%s: the pull is half the slope of the loss, the slopes are those of root and pull',
		(name) => {
			const { root, rootSlope, pull, pullSlope } = LOSSES[name];
			for (const u of [-9, -1.5, -0.3, 0.4, 1.2, 2.5, 30]) {
				const slope = (of: (at: number) => number) => (of(u + 1e-5) - of(u - 1e-5)) / 2e-5;
				expect(rootSlope(u)).toBeCloseTo(slope(root), 6);
				expect(pull(u)).toBeCloseTo(slope((at) => root(at) ** 2) / 2, 5);
				expect(pullSlope(u)).toBeCloseTo(slope(pull), 6);
			}
		}
	);

	it.each(names)('%s: counts small residuals as squares do, and is the same on both sides', (name) => {
		expect(LOSSES[name].root(0.01)).toBeCloseTo(0.01, 6);
		expect(LOSSES[name].root(-3)).toBe(-LOSSES[name].root(3));
	});

	it('of the forgiving ones let no residual pull without limit', () => {
		expect(LOSSES['soft-l1'].pull(1e6)).toBeCloseTo(2, 6);
		expect(LOSSES.huber.pull(1e6)).toBe(1.345);
		expect(LOSSES.squares.pull(1e6)).toBe(1e6);
	});
});

describe('how many readings say as much as one', () => {
	const COUNT = 20_000;
	const drift = (keeps: number): Float64Array => {
		const values = new Float64Array(COUNT);
		for (let at = 1; at < COUNT; at++) {
			values[at] = keeps * values[at - 1]! + Math.sqrt(1 - keeps ** 2) * normalNumber(3, at);
		}
		return values;
	};
	const from = {
		source: 'Bayley and Hammersley, J. R. Statist. Soc. Suppl. 8 (1946) 184',
		place: 'effective number of readings of a first-order autoregression, (1 + φ)/(1 − φ)',
		standing: 'from memory' as const,
		unit: '',
		tolerance: { relative: 0.15 },
		because: '20,000 readings with a seed: the estimate itself strays by several percent'
	};
	[0.3, 0.6, 0.9].forEach((keeps) =>
		checkAgainst(
			{ ...from, name: `readings per independent one, φ = ${keeps}`, expected: (1 + keeps) / (1 - keeps) },
			() => countPerIndependent([drift(keeps)])
		)
	);

	it('is one for independent readings, for those that alternate, and for none', () => {
		expect(countPerIndependent([drift(0)])).toBeLessThan(1.1);
		expect(countPerIndependent([Float64Array.from({ length: 100 }, (_, at) => (-1) ** at)])).toBe(1);
		expect(countPerIndependent([new Float64Array(50).fill(NaN)])).toBe(1);
	});

	it('does not mind gaps', () => {
		const gaps = drift(0.6).map((value, at) => (at % 97 < 10 ? NaN : value));
		expect(countPerIndependent([gaps])).toBeGreaterThan(3.4);
		expect(countPerIndependent([gaps])).toBeLessThan(4.6);
	});

	it('counts a lasting misfit as hanging together', () => {
		expect(countPerIndependent([drift(0).map((value) => value + 2)])).toBeGreaterThan(1000);
	});
});

describe('what drives the model in a trace', () => {
	const scenario = defaultScenario([{ minutes: 120 }]);
	const timeS = Float64Array.from({ length: 120 }, (_, at) => 60 * at + 30);
	const dayC = (atS: number) => ambientTempC(6 + atS / 3600, scenario.climate);
	const condense = (channels: Parameters<typeof condenseCourse>[0]['channels']) =>
		condenseCourse({ startedAtHour: 6, timeS, channels }, scenario);

	it('is the measured air, which a single wrong reading does not move', () => {
		const ambientC = timeS.map((time) => dayC(time) - 4);
		ambientC[50] = 80;
		condense({ ambientC }).air.valuesC.forEach((value, at) =>
			expect(value).toBeCloseTo(dayC(300 * at) - 4, 1)
		);
	});

	it('follows the day’s curve through a gap, moved to meet both ends', () => {
		const ambientC = timeS.map((time, at) => (at < 30 ? dayC(time) + 2 : at < 90 ? NaN : dayC(time) + 4));
		const { valuesC } = condense({ ambientC }).air;
		expect(valuesC[12]! - dayC(3600)).toBeCloseTo(3, 1);
		expect(valuesC[24]! - dayC(7200)).toBeCloseTo(4, 1);
	});

	it('is a current that heats as the measured one did, and none where none was read', () => {
		const currentA = timeS.map((_, at) => (at < 5 ? (at % 2 ? -30 : -10) : at < 10 ? NaN : 8));
		const { valuesA } = condense({ currentA }).current!;
		expect(valuesA[0]).toBeCloseTo(-Math.sqrt((3 * 100 + 2 * 900) / 5), 9);
		expect([valuesA[1], valuesA[2]]).toEqual([NaN, 8]);
	});
});

describe('the inverse of a matrix', () => {
	it('times the matrix is one', () => {
		const matrix = [
			[4, 1, -1],
			[1, 3, 0.5],
			[-1, 0.5, 5]
		];
		multiply(invertPositive(matrix), matrix).forEach((row, a) =>
			row.forEach((value, b) => expect(value).toBeCloseTo(a === b ? 1 : 0, 12))
		);
	});
});
