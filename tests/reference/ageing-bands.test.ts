import { describe, expect, it } from 'vitest';
import {
	leadAcidBand,
	lfpAgeingBand,
	naumannCalendarLoss,
	naumannCycleLoss,
	SECONDS_PER_YEAR,
	swierczynskiCalendarLoss,
	wangCapacityLoss,
	wangCellAh,
	type HoursAtTemperature,
	type LfpDuty
} from '../../src/lib/thermal/ageing';
import { checkAgainst } from './support/check-against';

const steady = (tempC: number): HoursAtTemperature[] => [{ tempC, hours: 8766 }];

/**
 * A pack under the bonnet of a car in a temperate place: parked in the shade most of the year, 860 hours a year between
 * 40 and 55 °C from driving and from soaking after it.
 */
const TEMPERATE_YEAR: HoursAtTemperature[] = [
	{ tempC: 5, hours: 500 },
	{ tempC: 10, hours: 1500 },
	{ tempC: 15, hours: 2200 },
	{ tempC: 20, hours: 2000 },
	{ tempC: 25, hours: 1100 },
	{ tempC: 30, hours: 600 },
	{ tempC: 40, hours: 400 },
	{ tempC: 50, hours: 300 },
	{ tempC: 55, hours: 160 }
];
const UNDER_BONNET: LfpDuty = {
	year: TEMPERATE_YEAR,
	soc: 0.5,
	capacityAh: 130,
	takenOutAhPerYear: 16_000,
	cRate: 0.1,
	depthOfDischarge: 0.4
};
const STEADY: LfpDuty = { ...UNDER_BONNET, year: steady(30), cRate: 0.5, depthOfDischarge: 0.8 };

describe('the band of a lithium iron phosphate pack', () => {
	const practice = {
		source: 'one pack of about 130 Ah under a bonnet, about 16,000 Ah taken out in a year',
		place: 'lost 3 to 5 % of its capacity in the year, as told',
		standing: 'common practice' as const,
		unit: '%'
	};
	const lossPercent = (read: 'remainingLow' | 'remainingHigh') => () =>
		100 * (1 - lfpAgeingBand(UNDER_BONNET, 1)[0]![read]);
	checkAgainst(
		{
			...practice,
			name: 'most that a year under a bonnet takes, at least what was seen',
			expected: 7.5,
			tolerance: { absolute: 2.5 },
			because: 'the band must hold the 5 % that was seen and not be twice as wide as that'
		},
		lossPercent('remainingLow')
	);
	checkAgainst(
		{
			...practice,
			name: 'least that a year under a bonnet takes, at most what was seen',
			expected: 2,
			tolerance: { absolute: 1 },
			because: 'the band must hold the 3 % that was seen and still say that something is lost'
		},
		lossPercent('remainingHigh')
	);

	it('is made of the laws themselves where the temperature is steady', () => {
		const [first] = lfpAgeingBand(STEADY, 1);
		const naumann = naumannCalendarLoss(30, 0.5, SECONDS_PER_YEAR);
		const swierczynski = swierczynskiCalendarLoss(30, 0.5, 12);
		const cycle = naumannCycleLoss(0.5, 0.8, 16_000 / 130);
		const wang = wangCapacityLoss(30, 0.5, wangCellAh(16_000, 130));
		const expected = [naumann, swierczynski].flatMap((standing) =>
			[cycle, wang].flatMap((cycling) => [standing + cycling, Math.hypot(standing, cycling)])
		);
		first!.ways.forEach(({ loss }, k) => expect(loss).toBeCloseTo(expected[k]!, 12));
		expect(first!.ways).toHaveLength(expected.length);
		expect(first!.remainingLow).toBeCloseTo(1 - Math.max(...expected) - 0.01, 12);
		expect(first!.remainingHigh).toBeCloseTo(1 - Math.min(...expected) + 0.01, 12);
		expect(first!.remainingMiddle).toBeCloseTo(1 - expected.reduce((a, b) => a + b) / 8, 12);
	});

	it('carries each law on with its own power of time', () => {
		const years = lfpAgeingBand({ ...STEADY, takenOutAhPerYear: 0 }, 9);
		const growth = years[8]!.ways.map(({ loss }, k) => loss / years[0]!.ways[k]!.loss);
		const [root, power] = [3, 9 ** 0.8];
		[root, root, root, root, power, power, power, power].forEach((expected, k) =>
			expect(growth[k]).toBeCloseTo(expected, 10)
		);
		expect(years[8]!.resistanceGain / years[0]!.resistanceGain).toBeCloseTo(9, 10);
	});

	it('puts hot and cold together by equivalent time, step by step', () => {
		const year = [
			{ tempC: 20, hours: 6000 },
			{ tempC: 50, hours: 2766 }
		];
		// First all the cold, then the heat from the time at which the heat alone would have come as far.
		const cold = naumannCalendarLoss(20, 0.5, 6000 * 3600);
		const perRootS = naumannCalendarLoss(50, 0.5, 1);
		const equivalentS = (cold / perRootS) ** 2;
		const expected = perRootS * Math.sqrt(equivalentS + 2766 * 3600);
		const [first] = lfpAgeingBand({ ...STEADY, year, takenOutAhPerYear: 0 }, 1);
		expect(first!.ways[0]!.loss).toBeCloseTo(expected, 12);
	});

	it('does not mind the order or the cutting of the hours', () => {
		const cut = TEMPERATE_YEAR.flatMap(({ tempC, hours }) => Array(4).fill({ tempC, hours: hours / 4 }));
		const [whole] = lfpAgeingBand(UNDER_BONNET, 1);
		const [parts] = lfpAgeingBand({ ...UNDER_BONNET, year: cut.reverse() }, 1);
		expect(parts!.remainingMiddle).toBeCloseTo(whole!.remainingMiddle, 12);
	});

	it('lies in order and falls from year to year', () => {
		const years = lfpAgeingBand(UNDER_BONNET, 10);
		for (const { remainingLow, remainingMiddle, remainingHigh } of years) {
			expect(remainingLow).toBeLessThan(remainingMiddle);
			expect(remainingMiddle).toBeLessThan(remainingHigh);
		}
		const middles = years.map(({ remainingMiddle }) => remainingMiddle);
		expect([...middles].sort((a, b) => b - a)).toEqual(middles);
		expect(new Set(middles).size).toBe(10);
	});

	it('is worse when it is hotter, fuller, or gives more', () => {
		const middle = (change: Partial<LfpDuty>) =>
			lfpAgeingBand({ ...UNDER_BONNET, ...change }, 3)[2]!.remainingMiddle;
		const hotter = TEMPERATE_YEAR.map(({ tempC, hours }) => ({ tempC: tempC + 5, hours }));
		const now = middle({});
		expect(middle({ year: hotter })).toBeLessThan(now);
		expect(middle({ soc: 0.9 })).toBeLessThan(now);
		expect(middle({ takenOutAhPerYear: 30_000 })).toBeLessThan(now);
	});

	it('says where a model is used outside its tests', () => {
		const year = [
			{ tempC: 15, hours: 8000 },
			{ tempC: 30, hours: 700 },
			{ tempC: 64, hours: 40 },
			{ tempC: 70, hours: 26 }
		];
		const [first, , third] = lfpAgeingBand({ ...UNDER_BONNET, year, soc: 0.95 }, 3);
		const list = first!.extrapolations.map(({ model, input, value, hoursPerYear }) => [
			model,
			input,
			value,
			hoursPerYear
		]);
		expect(list).toEqual([
			['Naumann 2018 calendar', 'tempC', 70, 66],
			['Swierczynski 2015 calendar', 'tempC', 15, 8000],
			['Swierczynski 2015 calendar', 'tempC', 70, 66],
			['Swierczynski 2015 calendar', 'soc', 0.95, null],
			['Naumann 2020 cycle', 'tempC', 15, 8000],
			['Naumann 2020 cycle', 'tempC', 70, 66],
			['Naumann 2020 cycle', 'cRate', 0.1, null],
			['Wang 2011 cycle', 'tempC', 70, 66]
		]);
		const later = third!.extrapolations.filter(({ input }) => input === 'years');
		expect(later.map(({ model }) => model)).toEqual(['Naumann 2018 calendar', 'Swierczynski 2015 calendar']);
	});

	it('holds the cycle law at its gentlest tested rate for gentler ones', () => {
		const losses = (cRate: number) =>
			lfpAgeingBand({ ...UNDER_BONNET, cRate }, 1)[0]!.ways.map(({ loss }) => loss);
		expect(losses(0.05)).toEqual(losses(0.2));
		expect(losses(0.4)[0]!).toBeGreaterThan(losses(0.2)[0]!);
	});

	it('is silent about tests when all is within them, ends included', () => {
		expect(lfpAgeingBand(STEADY, 2)[1]!.extrapolations).toEqual([]);
		const high = { ...STEADY, year: steady(40), soc: 0.9, cRate: 2, depthOfDischarge: 1 };
		const low = { ...STEADY, year: steady(25), soc: 0.1, cRate: 0.2 };
		expect([high, low].flatMap((duty) => lfpAgeingBand(duty, 1)[0]!.extrapolations)).toEqual([]);
	});

	it('never leaves more than all or less than nothing', () => {
		const [mild] = lfpAgeingBand({ ...STEADY, year: steady(-20), takenOutAhPerYear: 0 }, 1);
		expect(mild!.remainingHigh).toBeLessThanOrEqual(1);
		const hell = lfpAgeingBand({ ...STEADY, year: steady(90) }, 10)[9]!;
		expect(hell.remainingLow).toBe(0);
	});

	it('is refused for a duty that cannot be', () => {
		const band = (change: Partial<LfpDuty>, years = 1) =>
			expect(() => lfpAgeingBand({ ...STEADY, ...change }, years));
		band({ soc: 1.2 }).toThrow('soc is 1.2');
		band({ capacityAh: 0 }).toThrow('capacityAh is 0');
		band({ depthOfDischarge: 0 }).toThrow('depthOfDischarge is 0');
		band({ takenOutAhPerYear: -1 }).toThrow('takenOutAhPerYear is -1');
		band({ cRate: 12 }).toThrow('cRate is 12');
		band({ year: steady(20).concat(steady(30)) }).toThrow('hoursOfYear is 17532');
		band({}, 11).toThrow('years is 11: it must be a whole number within 1 to 10.');
		band({}, 1.5).toThrow('years is 1.5');
	});
});

describe('the band of a lead-acid battery', () => {
	const duty = { year: steady(45), ratedLifeYears: 8, ratedLifeAh: null, takenOutAhPerYear: 0 };

	it('lies between the two customs', () => {
		const { lifeYears, years } = leadAcidBand(duty, 3);
		expect(lifeYears.high).toBeCloseTo(2, 12);
		expect(lifeYears.low).toBeCloseTo(8 * 2 ** -2.4, 12);
		expect(lifeYears.middle).toBeGreaterThan(lifeYears.low);
		expect(lifeYears.middle).toBeLessThan(lifeYears.high);
		expect(years.map(({ remainingHigh }) => remainingHigh)).toEqual(
			[0.9, 0.8, 0.7].map((x) => expect.closeTo(x, 12))
		);
		expect(years.map(({ surelyWornOut }) => surelyWornOut)).toEqual([false, true, true]);
		for (const { remainingLow, remainingMiddle, remainingHigh } of years) {
			expect(remainingLow).toBeLessThan(remainingMiddle);
			expect(remainingMiddle).toBeLessThan(remainingHigh);
		}
	});

	it('counts the hours that are hotter than the rule', () => {
		const year = [
			{ tempC: 30, hours: 8700 },
			{ tempC: 60, hours: 40 },
			{ tempC: 65, hours: 20 }
		];
		expect(leadAcidBand({ ...duty, year }, 1).hoursBeyondRule).toBe(20);
		expect(leadAcidBand(duty, 1).hoursBeyondRule).toBe(0);
	});

	it('is refused for parts of years and hours that are not a year', () => {
		expect(() => leadAcidBand(duty, 0)).toThrow('years is 0');
		expect(() => leadAcidBand({ ...duty, year: [] }, 1)).toThrow('hoursOfYear is 0');
	});
});
