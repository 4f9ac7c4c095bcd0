import { describe, expect, it } from 'vitest';
import { EngineInputError } from '../../src/lib/thermal/correlations/require';
import { viewAreaOf, type HotPatch } from '../../src/lib/thermal/survey';

/**
 * By hand, from the disc formula of Incropera et al., 6th ed., Table 13.2:
 * patch 0.30 × 0.15 = 0.045 m², r1 = √(0.045/π) = 0.119683 m; side 0.33 × 0.215 = 0.07095 m², r2 = 0.150279 m; L = 0.15 m.
 * R1 = 0.797885, R2 = 1.001861; S = 1 + (1 + 1.003725)/0.636620 = 4.147450; (r2/r1)² = 0.07095/0.045 = 1.576667;
 * F12 = ½ (4.147450 − √(17.201344 − 6.306667)) = ½ (4.147450 − 3.300708) = 0.423371; 0.045 × 0.423371 = 0.0190517 m².
 */
const BY_HAND: HotPatch = {
	widthM: 0.3,
	heightM: 0.15,
	gapM: 0.15,
	facing: 'square-on',
	facingAreaM2: 0.33 * 0.215
};

describe('view area from a tape measure', () => {
	it('is the patch times the disc factor, as worked by hand', () => {
		expect(viewAreaOf(BY_HAND)).toBeCloseTo(0.0190517, 6);
	});

	it('is half of that at an angle and nothing when hidden', () => {
		expect(viewAreaOf({ ...BY_HAND, facing: 'at-an-angle' })).toBeCloseTo(0.0190517 / 2, 6);
		expect(viewAreaOf({ ...BY_HAND, facing: 'hidden' })).toBe(0);
	});

	it('is the whole patch against a much larger side close by', () => {
		expect(viewAreaOf({ ...BY_HAND, gapM: 1e-4, facingAreaM2: 10 })).toBeCloseTo(0.045, 6);
	});

	it('falls with the square of a large gap', () => {
		const far = viewAreaOf({ ...BY_HAND, gapM: 50 });
		expect(viewAreaOf({ ...BY_HAND, gapM: 100 }) / far).toBeCloseTo(0.25, 4);
	});

	it('never exceeds the patch or the side, whichever is smaller', () => {
		for (const gapM of [0.01, 0.05, 0.2, 1]) {
			for (const facingAreaM2 of [0.001, 0.03, 0.045, 0.5]) {
				const view = viewAreaOf({ ...BY_HAND, gapM, facingAreaM2 });
				expect(view).toBeLessThan(Math.min(0.045, facingAreaM2) + 1e-12);
			}
		}
	});

	it('is refused without a gap', () => {
		expect(() => viewAreaOf({ ...BY_HAND, gapM: 0 })).toThrow(EngineInputError);
	});
});
