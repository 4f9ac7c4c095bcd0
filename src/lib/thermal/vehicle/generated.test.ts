import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { generateStep } from '../network/step-generator/generate-step';
import { findHeatWeights } from '../network/step-generator/heat-weights';
import { RODAS } from '../solve/rodas';
import { generateVehicleSteps } from './generate-vehicle-steps';

describe('the generated steps', () => {
	it('are what the generator writes from the tables of the network (else: npm run generate)', () => {
		const written = readFileSync(new URL('./generated/vehicle-steps.ts', import.meta.url), 'utf8');
		expect(written).toBe(generateVehicleSteps());
	});

	it('refuse to drive a link that radiates', () => {
		const shape = {
			stored: ['pan'],
			fixed: ['sky'],
			mixed: [],
			links: [{ name: 'glow', kind: 'radiation' as const, from: 'pan', to: 'sky' }],
			sources: [],
			driven: { bent: ['glow'], lit: [] }
		};
		expect(() => generateStep('stepPan', shape)).toThrow('the radiation link "glow" cannot be driven');
	});
});

describe('the weights with which the method sums heats', () => {
	it('add up to one, as those of any consistent method', () => {
		expect(findHeatWeights().stages.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(1, 12);
	});

	it('meet the condition of order two: Σ bᵢ αᵢ and Σ bᵢ γᵢ make one half', () => {
		const { stages, timeDerivative } = findHeatWeights();
		const atTimes = stages.reduce((sum, weight, stage) => sum + weight * RODAS.times[stage]!, 0);
		expect(atTimes + timeDerivative).toBeCloseTo(0.5, 9);
	});
});
