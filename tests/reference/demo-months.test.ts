import { describe, expect, it } from 'vitest';
import places from '../../seeds/demo-places.json';
import { placeInputSchema } from '../../src/lib/schemas/places';
import { readTable } from './support/reference-data';

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const stations = new Map(readTable('climate/stations.csv').map((row) => [row.station!, row]));
const demo = places.map((place) => placeInputSchema.parse(place));
const known = demo.filter(({ name }) => stations.has(name));

describe('the months of the demo places', () => {
	it('are there where the public table has the place, and nowhere else', () => {
		expect(known.map(({ name }) => name)).toEqual(['Alice Springs', 'Cape Town', 'Brisbane']);
		expect(demo.filter(({ monthlyMaxC }) => monthlyMaxC !== null)).toEqual(known);
	});

	it.each(known)('are its monthly means and half the range of its hot day: $name', (place) => {
		const row = stations.get(place.name)!;
		MONTHS.forEach((month, at) => {
			const highestC = Number(row[`meanC${month}`]) + place.dailyRangeK / 2;
			expect(place.monthlyMaxC?.[at]).toBeCloseTo(highestC, 9);
		});
	});

	it('agree with the published mean January maximum of Alice Springs, 36.4 °C', () => {
		const alice = known.find(({ name }) => name === 'Alice Springs');
		expect(alice?.monthlyMaxC?.[0]).toBeCloseTo(36.4, 9);
	});

	it.each(known)('say where they come from, and what is a choice: $name', ({ monthsSource }) => {
		expect(monthsSource).toMatch(/^Public monthly means of the whole day/);
		expect(monthsSource).toContain('our choice, no source');
	});
});
