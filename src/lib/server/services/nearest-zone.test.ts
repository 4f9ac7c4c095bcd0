import { describe, expect, it } from 'vitest';
import { isTimeZone } from '$lib/thermal/traces';
import { guessZone } from './nearest-zone';
import { ZONE_PLACES } from './zone-places';

describe('the time zone of a place', () => {
	it.each([
		['Darwin', -12.46, 130.84, 'Australia/Darwin'],
		['Brisbane', -27.47, 153.03, 'Australia/Brisbane'],
		['Adelaide', -34.93, 138.6, 'Australia/Adelaide'],
		['Perth', -31.95, 115.86, 'Australia/Perth'],
		['Broken Hill', -31.96, 141.47, 'Australia/Broken_Hill'],
		['Canberra', -35.28, 149.13, 'Australia/Sydney'],
		['Cape Town', -33.92, 18.42, 'Africa/Johannesburg'],
		['Phoenix', 33.45, -112.07, 'America/Phoenix'],
		['a coast in the north of Australia', -12.5, 131, 'Australia/Darwin'],
		['a town on the Rhine', 47.6, 7.6, 'Europe/Zurich'],
		['Kalgoorlie', -30.75, 121.47, 'Australia/Perth'],
		['an island beyond the date line', -43.9, -176.6, 'Pacific/Chatham']
	])('is clear for %s', (_what, latitudeDeg, longitudeDeg, clear) => {
		expect(guessZone({ latitudeDeg, longitudeDeg })).toEqual({ clear, candidates: [clear] });
	});

	it.each([
		['Alice Springs', -23.7, 133.88, 'Australia/Darwin'],
		['Mount Isa', -20.73, 139.49, 'Australia/Brisbane'],
		['Balladonia', -32.35, 123.62, 'Australia/Perth'],
		['Wilcannia', -31.56, 143.38, 'Australia/Sydney'],
		['a roadhouse on the plain east of Eucla', -31.45, 130.9, 'Australia/Adelaide'],
		['Townsville', -19.26, 146.82, 'Australia/Brisbane'],
		['Dallas', 32.78, -96.8, 'America/Chicago'],
		['an island between Fiji and Tonga', -17.8, -179.9, 'Pacific/Fiji']
	])(
		'is not clear for %s, and the right one is among those named',
		(_what, latitudeDeg, longitudeDeg, right) => {
			const { clear, candidates } = guessZone({ latitudeDeg, longitudeDeg });
			expect(clear).toBeNull();
			expect(candidates).toContain(right);
			expect(candidates.length).toBeGreaterThan(1);
			expect(candidates.length).toBeLessThan(6);
		}
	);

	it('is always one that the machine knows', () => {
		const names = ZONE_PLACES.trim()
			.split('\n')
			.map((line) => line.split(' ')[2]);
		expect(names.length).toBeGreaterThan(300);
		expect(names.filter((name) => !isTimeZone(name))).toEqual([]);
	});
});
