import { jeffreysInterval, sampleQuantile, scrambledSobolPoint, type Interval } from '../statistics';
import type { Scenario } from '../types';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { drawScenario } from './draw-scenario';
import { PRIORS } from './priors';
import type { SpreadOptions } from './spread-day';

const CONFIDENCE = 0.9;

export interface CutOutChance {
	/** Share of the days drawn that end in the dark. */
	share: number;
	/** Where it lies with nine chances in ten, as far as the number of draws goes. */
	interval: Interval;
	/** In the middle of the days drawn, K. */
	middleHeadroomK: number;
}

/**
 * How often a day like this one ends in the dark: the same draws as spreadDay's, run for their outcome alone.
 *
 *     share = cut-outs / draws,  with Jeffreys' interval
 *
 * @param scenario as it was estimated
 * @param options number of draws (a power of two keeps them even) and seed
 * @returns share of days, its interval of 90 %, and the middle headroom in K
 * @throws RunFailedError when a draw cannot be run to its end
 * Validity: the priors of PRIORS, independent of one another; the model itself is taken for true.
 * Source: as spreadDay: Owen (1995); Brown, Cai, DasGupta, Statist. Sci. 16 (2001) 101.
 * @example
 * drawCutOuts(defaultScenario([{ minutes: 60 }]), { samples: 8, seed: 1 }).share; // 0
 */
export function drawCutOuts(scenario: Scenario, { samples, seed }: SpreadOptions): CutOutChance {
	const runner = new OutcomeRunner();
	const headroomsK: number[] = [];
	let cutOuts = 0;
	for (let draw = 0; draw < samples; draw++) {
		const drawn = drawScenario(scenario, scrambledSobolPoint(draw, PRIORS.length, seed));
		const { cutsOut, peakSensorC } = runner.run(drawn);
		headroomsK.push(drawn.bms.discharge.cut - peakSensorC);
		if (cutsOut) cutOuts++;
	}
	return {
		share: cutOuts / samples,
		interval: jeffreysInterval(cutOuts, samples, CONFIDENCE),
		middleHeadroomK: sampleQuantile(headroomsK, 0.5)
	};
}
