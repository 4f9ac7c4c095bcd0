import { describe, expect, it } from 'vitest';
import {
	australianClimateZone,
	buildingMoistureLetter,
	buildingThermalZone,
	climateClass,
	coolingDegreeDays,
	degreeDaysOfMonths,
	degreeHoursOfDay,
	degreeHoursOfMonth,
	drynessLimitMm,
	EngineInputError,
	heatingDegreeDays,
	heatZone,
	yearlyMeanC,
	type AustralianPlace,
	type MonthlyClimate
} from '../../src/lib/thermal/correlations';

const year = (value: number): number[] => Array.from({ length: 12 }, () => value);
const swing = (meanC: number, halfRangeK: number): number[] =>
	Array.from({ length: 12 }, (_, month) => meanC - halfRangeK * Math.cos((2 * Math.PI * month) / 12));
/** Half a year on: what a place of the other hemisphere has. */
const turned = (months: readonly number[]): number[] => [...months.slice(6), ...months.slice(0, 6)];

describe('climate classes', () => {
	const places: MonthlyClimate[] = [
		{ meanC: swing(12, 10), rainMm: [80, 70, 60, 50, 30, 10, 5, 8, 30, 60, 80, 90] },
		{ meanC: swing(3, 14), rainMm: [4, 5, 8, 15, 40, 70, 90, 80, 40, 15, 8, 5] },
		{ meanC: swing(24, 9), rainMm: year(12) },
		{ meanC: swing(20, 3), rainMm: year(70) }
	];

	it('are the same in both hemispheres', () => {
		for (const { meanC, rainMm } of places) {
			expect(climateClass({ meanC: turned(meanC), rainMm: turned(rainMm) })).toBe(
				climateClass({ meanC, rainMm })
			);
		}
		expect(places.map(climateClass)).toEqual(['Csa', 'Dwb', 'BWh', 'Cfa']);
	});

	it('change letter where a threshold says so, and not before', () => {
		const wet = year(100);
		expect(climateClass({ meanC: year(18), rainMm: wet })).toBe('Af');
		expect(climateClass({ meanC: [17.9, ...year(18).slice(1)], rainMm: wet })).toBe('Cfb');
		expect(climateClass({ meanC: year(10), rainMm: wet })).toBe('ET');
		expect(climateClass({ meanC: [...year(10).slice(1), 10.1], rainMm: wet })).toBe('Cfc');
		expect(climateClass({ meanC: year(0), rainMm: wet })).toBe('EF');
		const limit = drynessLimitMm({ meanC: year(20), rainMm: wet }) / 12;
		expect(climateClass({ meanC: year(20), rainMm: year(limit) })).toBe('Aw');
		expect(climateClass({ meanC: year(20), rainMm: year(limit * 0.999) })).toBe('BSh');
		expect(climateClass({ meanC: year(20), rainMm: year(limit * 0.499) })).toBe('BWh');
		expect(climateClass({ meanC: year(18), rainMm: year(5) })).toBe('BWh');
		expect(climateClass({ meanC: year(17.99), rainMm: year(5) })).toBe('BWk');
	});

	it('mind in which half of the year the rain falls: dryness by 140 and 280 mm', () => {
		const meanC = swing(15, 8);
		const winterRain = [9, 9, 9, 0, 0, 0, 0, 0, 0, 9, 9, 9];
		expect(drynessLimitMm({ meanC, rainMm: winterRain })).toBeCloseTo(300, 9);
		expect(drynessLimitMm({ meanC, rainMm: year(9) })).toBeCloseTo(440, 9);
		expect(drynessLimitMm({ meanC, rainMm: turned(winterRain) })).toBeCloseTo(580, 9);
		expect(yearlyMeanC({ meanC, rainMm: year(9) })).toBeCloseTo(15, 12);
	});
});

describe('degree-days', () => {
	it('above and below a base differ by the sum of all differences', () => {
		const days = [3, 9.5, 12, 18, 24, 31];
		const sum = days.reduce((total, tempC) => total + tempC - 15, 0);
		expect(coolingDegreeDays(days, 15) - heatingDegreeDays(days, 15)).toBeCloseTo(sum, 12);
	});

	it('from monthly means are a floor of those of the days', () => {
		// Half the days 5 K above the base, half 5 K below: the mean hides what the days hold.
		const days = Array.from({ length: 30 }, (_, day) => (day % 2 === 0 ? 23 : 13));
		expect(coolingDegreeDays(days, 18)).toBe(75);
		expect(degreeDaysOfMonths(year(18), 18, 'above')).toBe(0);
		expect(degreeDaysOfMonths(year(28), 18, 'above')).toBeCloseTo(3652.5, 9);
		expect(degreeDaysOfMonths(year(8), 18, 'below')).toBeCloseTo(3652.5, 9);
	});
});

describe('zones of the building codes', () => {
	it.each([
		[6001, 0, 0],
		[6000, 0, 1],
		[5000, 0, 2],
		[3500, 2000, 3],
		[3500, 2001, 4],
		[0, 3001, 5],
		[0, 5000, 6],
		[0, 7000, 7],
		[0, 7001, 8]
	])('%d warm and %d cold degree-days are zone %d', (cdd10, hdd18, zone) => {
		expect(buildingThermalZone(cdd10, hdd18)).toBe(zone);
	});

	it('are marine, dry or humid, and mind the season of the rain from 2013', () => {
		const summerRain = [0, 0, 0, 110, 110, 110, 110, 110, 110, 0, 0, 0];
		const monsoon = { meanC: swing(25, 8), rainMm: summerRain };
		expect(buildingMoistureLetter(monsoon, 2010)).toBe('A');
		expect(buildingMoistureLetter(monsoon, 2013)).toBe('B');
		expect(buildingMoistureLetter({ meanC: swing(11, 6), rainMm: year(60) }, 2010)).toBe('C');
		expect(buildingMoistureLetter({ meanC: [...year(12).slice(1), 21.9], rainMm: year(60) }, 2010)).toBe('C');
		expect(buildingMoistureLetter({ meanC: [...year(12).slice(1), 22], rainMm: year(60) }, 2010)).toBe('A');
		expect(buildingMoistureLetter({ meanC: swing(20, 9), rainMm: year(20) }, 2010)).toBe('B');
	});

	const PLACE: AustralianPlace = {
		januaryMaxC: 30,
		januaryVapourKPa: 2.1,
		julyMeanC: 14,
		hdd18: 0,
		alpine: false
	};
	it.each([
		[{}, 1],
		[{ januaryMaxC: 29.9 }, 2],
		[{ januaryVapourKPa: 2.09 }, 3],
		[{ januaryVapourKPa: 2.09, julyMeanC: 13.9 }, 4],
		[{ januaryVapourKPa: 1.5, januaryMaxC: 27, hdd18: 999 }, 5],
		[{ januaryVapourKPa: 1.5, januaryMaxC: 27, hdd18: 1000 }, 6],
		[{ januaryVapourKPa: 1.5, januaryMaxC: 27, hdd18: 2000 }, 7],
		[{ alpine: true }, 8]
	])('%o is Australian zone %d', (change, zone) => {
		expect(australianClimateZone({ ...PLACE, ...change })).toBe(zone);
	});
});

describe('degree-hours', () => {
	const AWAY = Array.from({ length: 24 }, (_, hour) => Math.abs(12 - hour));

	it('of a day that rises and falls evenly are those of its triangle', () => {
		// From 0 to 12 and back: above c a triangle of height 12 − c and base 2 (12 − c).
		for (const thresholdC of [0, 3, 6.5, 11.25]) {
			expect(degreeHoursOfDay(AWAY, thresholdC)).toBeCloseTo((12 - thresholdC) ** 2, 9);
		}
	});

	it('below all of the day are its mean above the threshold, above all of it nothing', () => {
		expect(degreeHoursOfDay(AWAY, -5)).toBeCloseTo(24 * (6 + 5), 9);
		expect(degreeHoursOfDay(AWAY, 12)).toBe(0);
	});

	it('of the design day below its coolest are its mean: 32.4925 °C at 40 °C and 14 K', () => {
		expect(degreeHoursOfMonth({ maxC: 40, minC: 26, days: 1 }, 20)).toBeCloseTo(24 * 12.4925, 8);
	});

	it('grow with the heat of the month by less than 24 hours a kelvin, and with its days', () => {
		const at = (maxC: number) => degreeHoursOfMonth({ maxC, minC: maxC - 14, days: 30 }, 35);
		expect(at(41) - at(40)).toBeGreaterThan(0);
		expect(at(41) - at(40)).toBeLessThan(30 * 24);
		expect(degreeHoursOfMonth({ maxC: 40, minC: 26, days: 15 }, 35) * 2).toBeCloseTo(at(40), 9);
	});

	it('name a place by the average day of its hottest month', () => {
		const month = (maxC: number) => ({ maxC, minC: maxC - 14, days: 31 });
		expect([35, 37, 41, 46].map((maxC) => heatZone([month(20), month(maxC), month(25)]))).toEqual([
			'mild',
			'warm',
			'hot',
			'very hot'
		]);
	});
});

describe('climates outside their range', () => {
	const wet = year(100);
	it.each([
		['eleven months', () => climateClass({ meanC: year(10).slice(1), rainMm: wet }), 'monthsOfMeanC', 11],
		[
			'a month without a number',
			() => climateClass({ meanC: [NaN, ...year(9).slice(1)], rainMm: wet }),
			'monthMeanC',
			NaN
		],
		['rain below nothing', () => drynessLimitMm({ meanC: year(9), rainMm: year(-1) }), 'monthRainMm', -1],
		['a month hotter than any', () => yearlyMeanC({ meanC: year(51), rainMm: wet }), 'monthMeanC', 51],
		['no days', () => heatingDegreeDays([], 18), 'days', 0],
		['a base beyond sense', () => coolingDegreeDays([20], 200), 'baseC', 200],
		['half a year', () => degreeDaysOfMonths(year(9).slice(6), 18, 'above'), 'months', 6],
		['degree-days below zero', () => buildingThermalZone(-1, 0), 'cdd10', -1],
		[
			'vapour below nothing',
			() =>
				australianClimateZone({
					januaryMaxC: 30,
					januaryVapourKPa: -1,
					julyMeanC: 9,
					hdd18: 0,
					alpine: false
				}),
			'januaryVapourKPa',
			-1
		],
		['a day of 23 hours', () => degreeHoursOfDay(new Array<number>(23).fill(20), 10), 'hours', 23],
		[
			'a lowest above the highest',
			() => degreeHoursOfMonth({ maxC: 20, minC: 25, days: 30 }, 10),
			'maxC',
			20
		],
		['a month of 40 days', () => degreeHoursOfMonth({ maxC: 40, minC: 25, days: 40 }, 10), 'days', 40],
		['a place without months', () => heatZone([]), 'months', 0]
	] as const)('are refused with name and value: %s', (_, run, input, value) => {
		expect(run).toThrow(EngineInputError);
		expect(run).toThrow(expect.objectContaining({ input, value }) as Error);
	});
});
