import { describe, expect, it, vi } from 'vitest';
import type { SignedInPerson } from '$lib/schemas/people';
import { simulateScenario } from '$lib/thermal';
import { runOnce, simulate } from './simulations';

const installer: SignedInPerson = {
	...{ id: 1, workshopId: 1, workshopName: 'Shop', customerId: null },
	...{ name: 'Noor', email: 'noor@shop.example', role: 'installer' }
};
const DAY = { legs: [{ minutes: 120, engineOn: true, speedKmh: 80 }, { minutes: 240 }] };

function refusalOf(input: unknown): unknown {
	try {
		return runOnce(input);
	} catch (error) {
		return error;
	}
}

describe('simulate', () => {
	it('answers what the engine answers', () => {
		const result = simulateScenario(DAY);
		expect(result.status).toBe('done');
		expect(runOnce(DAY)).toEqual(result.status === 'done' ? result.report : null);
	});

	it.each([
		['a field that is not there', { ...DAY, engin: {} }, 'unknown_field', 'engin'],
		[
			'a zero heat capacity',
			{ ...DAY, battery: { cellHeatCapacity: 0 } },
			'out_of_range',
			'battery.cellHeatCapacity'
		],
		[
			'a reset not below its cut',
			{ ...DAY, bms: { charge: { cut: 50, reset: 50 } } },
			'inconsistent',
			'bms.charge.reset'
		],
		['no legs', { legs: [] }, 'no_legs', 'legs'],
		['no object', null, 'wrong_type', '']
	])('says what, where and the limit for %s', (_what, input, code, path) => {
		expect(refusalOf(input)).toMatchObject({
			code: 'invalid_input',
			problems: [{ code, path, limit: expect.any(String), message: expect.any(String) }]
		});
	});

	it('names an infinite value, which JSON itself cannot carry', () => {
		expect(refusalOf({ ...DAY, charger: { maxA: Infinity } })).toMatchObject({
			problems: [{ code: 'not_finite', path: 'charger.maxA', value: 'Infinity' }]
		});
	});

	it('says a large value in words instead of sending it back', () => {
		expect(refusalOf({ ...DAY, extra: { deep: 'x'.repeat(1e5) } })).toMatchObject({
			problems: [{ code: 'unknown_field', path: 'extra', value: 'an object' }]
		});
		expect(refusalOf({ ...DAY, extra: 'x'.repeat(1e5) })).toMatchObject({
			problems: [{ path: 'extra', value: `${'x'.repeat(60)}…` }]
		});
	});

	it('is not for customers', async () => {
		await expect(simulate({ ...installer, role: 'customer' }, DAY)).rejects.toThrow(/role/);
	});

	it('says that a run could not be finished', async () => {
		vi.resetModules();
		vi.doMock('$lib/thermal', async (original) => ({
			...(await original<typeof import('$lib/thermal')>()),
			simulateScenario: () => ({
				status: 'failed',
				reason: 'Too many steps.',
				atHour: 9,
				steps: 1,
				evaluations: 1
			})
		}));
		const { runOnce: runFailing } = await import('./simulations');
		expect(() => runFailing(DAY)).toThrow(
			expect.objectContaining({
				code: 'simulation_failed',
				message: expect.stringContaining('Too many steps.')
			})
		);
		vi.doUnmock('$lib/thermal');
	});
});
