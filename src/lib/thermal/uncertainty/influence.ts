import { planSensitivity, readSensitivity } from '../statistics';
import type { Scenario } from '../types';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { drawScenario } from './draw-scenario';
import { PRIORS, type Prior } from './priors';

/** What one unknown does to the headroom. */
export interface Influence {
	key: string;
	label: string;
	measure: string;
	basis: string;
	/** Share of the headroom's variance that would go if it were known, and its standard error. */
	totalEffect: number;
	standardError: number;
}

export interface Influences {
	seed: number;
	evaluations: number;
	/** Standard deviation of the headroom, K. */
	spreadK: number;
	/** The strongest first. */
	ranking: Influence[];
}

/** Two points that differ in one coordinate alone: an unknown that moves nothing there is left out of the plan. */
function findActive(scenario: Scenario): Prior[] {
	const before = JSON.stringify(drawScenario(scenario, [], []));
	return PRIORS.filter((prior) => JSON.stringify(drawScenario(scenario, [0.9], [prior])) !== before);
}

/**
 * Which few unknowns make the answer uncertain, and so what to measure first.
 *
 *     ST = share of the variance of the headroom that goes when the unknown is known
 *
 * @param scenario the day as it was estimated
 * @param options points in each matrix (a power of two), replicates, seed
 * @returns as a generator, yields the share of the work done; the total effects with standard errors, strongest first
 * Validity: as readSensitivity; the headroom is that of the highest reading of what the BMS watches.
 * Source: as readSensitivity.
 * @example
 * const work = rankInfluences(defaultScenario([{ minutes: 60 }]), { pointsEach: 2, replicates: 2, seed: 1 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.ranking.length > 5; // true
 */
export function* rankInfluences(
	scenario: Scenario,
	options: { pointsEach: number; replicates: number; seed: number }
): Generator<number, Influences> {
	const runner = new OutcomeRunner();
	const active = findActive(scenario);
	const plan = planSensitivity({ ...options, dimensions: active.length });
	const headrooms = new Float64Array(plan.count);
	for (let k = 0; k < plan.count; k++) {
		const drawn = drawScenario(scenario, plan.pointAt(k), active);
		headrooms[k] = drawn.bms.discharge.cut - runner.run(drawn).peakSensorC;
		yield (k + 1) / plan.count;
	}
	const { totalEffect, variance } = readSensitivity(plan, headrooms);
	return {
		seed: options.seed,
		evaluations: plan.count,
		spreadK: Math.sqrt(Math.max(variance.value, 0)),
		ranking: active
			.map(({ key, label, measure, basis }, at) => ({
				key,
				label,
				measure,
				basis,
				totalEffect: totalEffect[at]!.value,
				standardError: totalEffect[at]!.standardError
			}))
			.sort((a, b) => b.totalEffect - a.totalEffect)
	};
}
