import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { stepValue } from './step-value';

describe('stepValue', () => {
	it('adds no dust', () => {
		expect(stepValue(0.1, 1, { step: 0.2 })).toBe(0.3);
		expect(stepValue(1.25, -1, { step: 0.5 })).toBe(0.75);
	});

	it('never leaves its range, wherever it starts', () => {
		const range = { step: 7, min: -20, max: 55 };
		fc.assert(
			fc.property(
				fc.integer({ min: -1000, max: 1000 }),
				fc.constantFrom(1 as const, -1 as const),
				(value, way) => {
					const next = stepValue(value, way, range);
					expect(next).toBeGreaterThanOrEqual(range.min);
					expect(next).toBeLessThanOrEqual(range.max);
				}
			)
		);
	});
});
