import { describe, expect, it } from 'vitest';
import type { Block } from './blocks';
import { findMisfits } from './misfits';

const MINUTES = 600;
/** A bay that warms slowly. */
const measured = Float64Array.from({ length: MINUTES }, (_, at) => 30 + at / 100);
const BLOCK: Block = { trace: 0, channel: 'bayAirC', row: 0, measured, at: new Int32Array() };
const residuals = (of: (minute: number) => number) => [
	Float64Array.from({ length: MINUTES }, (_, at) => of(at))
];

describe('what the model does not follow', () => {
	it('is told by the root mean square, so that hours of standing do not hide a drive', () => {
		// Off by 22 K in a drive of two hours, right while the vehicle stood.
		const [misfit] = findMisfits(
			[BLOCK],
			residuals((minute) => (minute < 120 ? -22 : 0.4))
		);
		expect(misfit).toMatchObject({ trace: 0, channel: 'bayAirC', measure: 'rms', noiseK: 0.5 });
		expect(misfit!.residualK).toBeCloseTo(Math.sqrt((120 * 22 ** 2 + 480 * 0.4 ** 2) / 600), 9);
	});

	it('is nothing where it is off by no more than thermometers are', () => {
		expect(
			findMisfits(
				[BLOCK],
				residuals((minute) => (minute % 2 === 0 ? 1 : -1))
			)
		).toEqual([]);
	});

	it('leaves out times without a reading', () => {
		const some = residuals((minute) => (minute % 3 === 0 ? NaN : 10));
		expect(findMisfits([BLOCK], some)[0]!.residualK).toBeCloseTo(10, 9);
	});
});
