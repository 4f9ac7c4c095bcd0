import { describe, expect, it } from 'vitest';
import {
	findOwnZone,
	hottestMonthC,
	ownZoneInputSchema,
	type ZonedPlace,
	type ZoneDefinition
} from './own-zones';

const PLACE: ZonedPlace = {
	...{ id: 7, latitudeDeg: -28, hotDayMaxC: 42, dailyRangeK: 14 },
	monthlyMeanC: [29, 28, 25, 21, 16, 13, 12, 14, 18, 22, 25, 28],
	monthlyMaxC: null
};
const zone = (id: number, changes: Partial<ZoneDefinition>): ZoneDefinition => ({
	...{ id, rule: 'latitude', fromValue: null, toValue: null, placeIds: [] },
	...changes
});

describe('a zone of the shop’s own', () => {
	it('takes places by the mean of their hottest month, from its lower end to below its upper', () => {
		const hot = zone(1, { rule: 'hottest-month', fromValue: 29 });
		const mild = zone(2, { rule: 'hottest-month', toValue: 29 });
		expect(findOwnZone(PLACE, [mild, hot])).toBe(1);
		expect(
			findOwnZone({ ...PLACE, monthlyMeanC: PLACE.monthlyMeanC!.map((meanC) => meanC - 0.1) }, [mild, hot])
		).toBe(2);
	});

	it('takes places by latitude or by name', () => {
		expect(findOwnZone(PLACE, [zone(3, { fromValue: -30, toValue: -20 })])).toBe(3);
		expect(findOwnZone(PLACE, [zone(3, { fromValue: -20, toValue: 0 })])).toBe(0);
		expect(findOwnZone(PLACE, [zone(4, { rule: 'places', placeIds: [5, 7] })])).toBe(4);
		expect(findOwnZone(PLACE, [zone(4, { rule: 'places', placeIds: [5] })])).toBe(0);
	});

	it('leaves a place to the first of several that would take it', () => {
		const both = [zone(8, { toValue: 0 }), zone(9, { rule: 'places', placeIds: [7] })];
		expect(findOwnZone(PLACE, both)).toBe(8);
		expect(findOwnZone(PLACE, [...both].reverse())).toBe(9);
	});

	it('goes by the highest of the days less half the range of the hot day where no means are known', () => {
		const monthlyMaxC = PLACE.monthlyMeanC!.map((meanC) => meanC + 9);
		expect(hottestMonthC({ ...PLACE, monthlyMeanC: null, monthlyMaxC })).toBe(29 + 9 - 7);
		// Estimated from latitude and hot day where nothing is known by month: 42 °C less two spreads of 3.5 K.
		expect(hottestMonthC({ ...PLACE, monthlyMeanC: null })).toBeCloseTo(35 - 7, 9);
	});

	it('needs a range that is one', () => {
		const problems = (changes: object) =>
			ownZoneInputSchema
				.safeParse({ name: 'North', position: 1, rule: 'latitude', ...changes })
				.error?.issues.map(({ path, message }) => `${path.join('.')}: ${message}`);
		expect(problems({})).toEqual(['fromValue: Give where the range begins, or where it ends.']);
		expect(problems({ fromValue: 5, toValue: 5 })).toEqual(['toValue: To below must be above from.']);
		expect(problems({ rule: 'hottest-month', toValue: 60 })).toEqual([
			'toValue: To below must be a number from −60 to 50.'
		]);
		expect(problems({ rule: 'places' })).toBeUndefined();
		expect(problems({ toValue: -30 })).toBeUndefined();
	});
});
