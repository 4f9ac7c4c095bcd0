import { describe, expect, it } from 'vitest';
import { isTimeZone } from '$lib/thermal/traces';
import { nearestZone } from './nearest-zone';
import { ZONE_PLACES } from './zone-places';

describe('the time zone that is nearest to a place', () => {
	it.each([
		['a coast in the north of Australia', -12.5, 131, 'Australia/Darwin'],
		['a town on the Rhine', 47.6, 7.6, 'Europe/Zurich'],
		['the plains of Patagonia', -48, -67, 'America/Argentina/Rio_Gallegos'],
		['an island on the other side of the date line', -17.8, -179.9, 'Pacific/Fiji']
	])('is found for %s', (_what, latitudeDeg, longitudeDeg, zone) => {
		expect(nearestZone({ latitudeDeg, longitudeDeg })).toBe(zone);
	});

	it('is always one that the machine knows', () => {
		const names = ZONE_PLACES.trim()
			.split('\n')
			.map((line) => line.split(' ')[2]);
		expect(names.length).toBeGreaterThan(300);
		expect(names.filter((name) => !isTimeZone(name))).toEqual([]);
	});
});
