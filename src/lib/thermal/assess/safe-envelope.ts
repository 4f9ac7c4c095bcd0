import { sampleQuantile, scrambledSobolPoint } from '../statistics';
import type { HeatLimits } from '../chemistries/guard';
import type { Scenario } from '../types';
import { copyScenario, drawScenario } from '../uncertainty/draw-scenario';
import { COOLEST_TRIED_C, findHottestDay, HOTTEST_TRIED_C } from '../uncertainty/hottest-day';
import { PRIORS } from '../uncertainty/priors';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { judgeOutcome } from './verdict';

/** The hottest day that the mount rides out with so much driving, °C; null where even the coolest tried is too hot. */
export interface EnvelopePoint {
	driveHours: number;
	/** As estimated. */
	middleC: number | null;
	/** What one drawn vehicle in ten stays below. */
	lowC: number | null;
	highC: number | null;
}

export interface SafeEnvelope {
	samples: number;
	seed: number;
	/** Days were tried between these; a limit at the upper one means at least so hot. */
	triedC: [low: number, high: number];
	/** Driving of the planned day, h. */
	plannedHours: number;
	plannedMaxC: number;
	points: EnvelopePoint[];
}

/** The weather and the driving are the axes: what is drawn is the vehicle and the mount. */
const DRAWN = PRIORS.filter(({ key }) => key !== 'dayMax' && key !== 'driveLength');
const DRIVE_HOURS = [1, 2, 4, 6, 8, 10, 12] as const;
const WITHIN_K = 0.5;
const OUTER = 0.1;

function sumDriving({ legs }: Scenario): number {
	return legs.reduce((sum, { engineOn, minutes }) => sum + (engineOn ? minutes / 60 : 0), 0);
}

/** The planned day with all driving legs longer or shorter by the same factor; the stops stay. */
function stretchDrive(scenario: Scenario, driveHours: number): Scenario {
	const by = driveHours / sumDriving(scenario);
	const stretched = copyScenario(scenario);
	for (const leg of stretched.legs) if (leg.engineOn) leg.minutes *= by;
	return stretched;
}

const within = (limitC: number): number | null =>
	limitC === -Infinity ? null : Math.min(limitC, HOTTEST_TRIED_C);

/** A quantile of limits of which some are beyond what was tried. */
function readLimit(limits: readonly number[], share: number): number | null {
	const clipped = limits.map((limitC) => Math.min(Math.max(limitC, COOLEST_TRIED_C), HOTTEST_TRIED_C));
	const valueC = sampleQuantile(clipped, share);
	return valueC <= COOLEST_TRIED_C ? null : valueC;
}

/**
 * How hot a day and how long a drive the mount still rides out.
 *
 *     T*(h) = hottest daily maximum at which the verdict is "rides it out" when the driving takes h hours
 *
 * @param scenario the day as it was estimated
 * @param options draws for the band (0: none), seed, and the limits of a battery that nothing switches off
 * @returns as a generator, yields the share of the work done; one point a length of drive, with the band that holds eight
 *   drawn vehicles in ten; no points for a plan without driving
 * Validity: the planned day with its driving stretched evenly; sun, daily range and loads as planned.
 * Source: bisection on the verdict.
 * @example
 * const work = findSafeEnvelope(defaultScenario([{ minutes: 60, engineOn: true }, { minutes: 60 }]), { samples: 0, seed: 1 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.points.length; // 7
 */
export function* findSafeEnvelope(
	scenario: Scenario,
	{ samples, seed, limits = null }: { samples: number; seed: number; limits?: HeatLimits | null }
): Generator<number, SafeEnvelope> {
	const runner = new OutcomeRunner();
	const plannedHours = sumDriving(scenario);
	const hours = plannedHours > 0 ? DRIVE_HOURS : [];
	const limitOf = (day: Scenario): number =>
		findHottestDay(
			day,
			runner,
			(outcome, tried) => judgeOutcome(tried, outcome, limits) === 'rides-it-out',
			WITHIN_K
		);
	const points: EnvelopePoint[] = [];
	for (const [at, driveHours] of hours.entries()) {
		const stretched = stretchDrive(scenario, driveHours);
		const middleC = within(limitOf(stretched));
		const limits: number[] = [];
		for (let draw = 0; draw < samples; draw++) {
			limits.push(limitOf(drawScenario(stretched, scrambledSobolPoint(draw, DRAWN.length, seed), DRAWN)));
			yield (at + (draw + 1) / samples) / hours.length;
		}
		points.push({
			driveHours,
			middleC,
			lowC: samples > 0 ? readLimit(limits, OUTER) : middleC,
			highC: samples > 0 ? readLimit(limits, 1 - OUTER) : middleC
		});
		yield (at + 1) / hours.length;
	}
	return {
		samples,
		seed,
		triedC: [COOLEST_TRIED_C, HOTTEST_TRIED_C],
		plannedHours,
		plannedMaxC: scenario.climate.tMax,
		points
	};
}
