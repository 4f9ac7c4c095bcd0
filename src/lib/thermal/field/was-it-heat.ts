import { sampleQuantile, scrambledSobolPoint } from '../statistics';
import type { MinuteSeries, Scenario } from '../types';
import { drawScenario } from '../uncertainty/draw-scenario';
import { PRIORS } from '../uncertainty/priors';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { runScenario } from '../vehicle/simulate';
import { findEndHour } from '../vehicle/spans';
import { checkReport, matchesReport, weighAnyTime, weighReport, type CutOutReport } from './cut-out-report';
import { rankOtherCauses, type RankedCause } from './other-causes';
import { effectiveCount, FEWEST_EFFECTIVE } from './weighted';

const EDGE = 0.05;
/** On so many days something else than heat makes a battery go dark of which that is asked: engineering judgement. */
const OTHERWISE_DARK_SHARE = 0.1;
/** From here on heat alone is taken for the cause, and below this it is not: engineering judgement. */
const EXPLAINED_FROM = 0.8;
const POSSIBLE_FROM = 0.2;
/** So many times the draws that were asked for are made at most where few of them bear on the report. */
const MOST_TIMES = 8;

export interface HourRange {
	lowHour: number;
	middleHour: number;
	highHour: number;
}

export interface HeatCause {
	/** Draws made: more than were asked for when few of those bore on the report. */
	samples: number;
	seed: number;
	/** How likely it is that heat alone did it. */
	heatProbability: number;
	finding: 'explained' | 'possible' | 'not-explained';
	/** Shares of the days drawn: dark at all; dark at about the time said; and back at about the time said too. */
	darkShare: number;
	whenShare: number;
	bothShare: number;
	/** When the days that end in the dark go dark and come back; null when hardly any does. */
	usuallyDark: HourRange | null;
	usuallyBack: HourRange | null;
	/** Hours of driving before it went dark, and whether the air outside was already getting cooler. */
	drivenHours: number;
	airFalling: boolean;
	/** The cells at that time as estimated, °C; null outside the day. */
	cellsC: number | null;
	otherCauses: RankedCause[];
}

const FEWEST_DARK = 8;

function rangeOf(hours: readonly number[]): HourRange | null {
	if (hours.length < FEWEST_DARK) return null;
	return {
		lowHour: sampleQuantile(hours, EDGE),
		middleHour: sampleQuantile(hours, 0.5),
		highHour: sampleQuantile(hours, 1 - EDGE)
	};
}

/** What the legs say of an hour: the driving before it, and whether the engine runs at it. */
function readLegs({ start, legs }: Scenario, hour: number): { drivenHours: number; engineOn: boolean } {
	let fromHour = start.hour;
	let drivenHours = 0;
	let engineOn = false;
	for (const leg of legs) {
		const toHour = fromHour + leg.minutes / 60;
		if (leg.engineOn) drivenHours += Math.max(0, Math.min(toHour, hour) - fromHour);
		if (hour >= fromHour && hour < toHour) engineOn = leg.engineOn;
		fromHour = toHour;
	}
	return { drivenHours, engineOn };
}

function minuteOf({ startHour, count }: MinuteSeries, hour: number): number | null {
	const minute = Math.round((hour - startHour) * 60);
	return minute >= 0 && minute < count ? minute : null;
}

function findFalling({ ambient }: MinuteSeries, minute: number | null): boolean {
	if (minute === null || minute === 0) return false;
	return ambient[minute]! < ambient[minute - 1]!;
}

/** What one draw in hundreds has come about by may be the draw: it makes nothing more than possible. */
function judge(probability: number, effectiveSamples: number): HeatCause['finding'] {
	if (probability >= EXPLAINED_FROM && effectiveSamples >= FEWEST_EFFECTIVE) return 'explained';
	return probability >= POSSIBLE_FROM ? 'possible' : 'not-explained';
}

/** What the estimate without spread has of the moment, and the other causes in their order. */
function readMoment(scenario: Scenario, report: CutOutReport) {
	const run = runScenario(scenario);
	const { wentDarkHour, cameBackHour } = report;
	const { drivenHours, engineOn } = readLegs(scenario, wentDarkHour);
	const minutes = run.status === 'done' ? run.minutes : null;
	const minute = minutes && minuteOf(minutes, wentDarkHour);
	const at = (series: Float64Array | undefined, otherwise: number): number =>
		series && minute !== null ? series[minute]! : otherwise;
	return {
		drivenHours,
		airFalling: minutes !== null && findFalling(minutes, minute),
		cellsC: minutes && minute !== null ? minutes.nodes.cells[minute]! : null,
		otherCauses: rankOtherCauses({
			soc: at(minutes?.soc, scenario.start.soc),
			currentA: at(minutes?.currentA, 0),
			capacityAh: scenario.battery.capacityAh,
			cellsC: at(minutes?.nodes.cells, scenario.climate.tMax),
			ambientC: at(minutes?.ambient, scenario.climate.tMax),
			darkHours: cameBackHour === null ? null : cameBackHour - wentDarkHour,
			engineOn
		})
	};
}

/**
 * Was it heat? Whether heat alone explains when a battery went dark and when it came back.
 *
 *     P = m/(m + r q),   m = mean over draws of L(report | run),   q = density of the report at any time for any length
 *
 * Against heat stands that on a share r = 0.1 of days something else makes the battery go dark, at any time of the day and
 * for any time up to twelve hours. Where some draws bear on the report and fewer than six do, counted as if they were
 * equal, more are made, up to eight times as many; what still rests on fewer is possible at most.
 *
 * @param scenario the mount on that day: the day's own maximum and its legs as they were driven
 * @param report when it went dark and came back, and how exactly that is known
 * @param options number of draws to begin with (a power of two) and seed
 * @returns as a generator, yields the share of the work done; then how likely heat is, on how many of the days drawn it
 *   went like that, when such days usually go dark and come back, and the other causes in order
 * @throws EngineInputError for a report that cannot be, RunFailedError when a draw cannot be run to its end
 * Validity: lithium batteries with a BMS whose limits are known; as the priors.
 * Source: Bayes' rule with the draws as prior (Kass and Raftery, J. Am. Stat. Assoc. 90 (1995) 773, for the ratio m/q);
 * the number of draws that bear on it after Kong, Technical Report 348, University of Chicago (1992); the tenth of days,
 * the twelve hours and the thresholds are engineering judgement.
 * @example
 * const report = { wentDarkHour: 5, cameBackHour: 6, withinHours: 0.5 };
 * const work = weighHeat(defaultScenario([{ minutes: 60 }]), report, { samples: 16, seed: 1 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.finding; // 'not-explained'
 */
export function* weighHeat(
	scenario: Scenario,
	report: CutOutReport,
	{ samples, seed }: { samples: number; seed: number }
): Generator<number, HeatCause> {
	checkReport(report);
	const runner = new OutcomeRunner();
	const darkHours: number[] = [];
	const backHours: number[] = [];
	const likelihoods: number[] = [];
	const isThin = () => {
		const effectiveSamples = effectiveCount(likelihoods);
		return effectiveSamples > 0 && effectiveSamples < FEWEST_EFFECTIVE;
	};
	let [when, both] = [0, 0];
	const most = samples * MOST_TIMES;
	for (let planned = samples; likelihoods.length < planned;) {
		const draw = likelihoods.length;
		const drawn = drawScenario(scenario, scrambledSobolPoint(draw, PRIORS.length, seed));
		const { darkSpans: spans } = runner.run(drawn);
		likelihoods.push(weighReport(spans, report));
		const matched = matchesReport(spans, report);
		if (matched.when) when++;
		if (matched.both) both++;
		const [first] = spans;
		if (first) {
			darkHours.push(first.fromHour);
			if (!first.open) backHours.push(first.toHour);
		}
		yield (draw + 1) / most;
		if (draw + 1 === planned && planned < most && isThin()) planned *= 2;
	}
	const made = likelihoods.length;
	const mean = likelihoods.reduce((sum, likelihood) => sum + likelihood, 0) / made;
	const anyTime = weighAnyTime(report, findEndHour(scenario) - scenario.start.hour);
	const heatProbability = mean / (mean + OTHERWISE_DARK_SHARE * anyTime);
	return {
		...{ samples: made, seed, heatProbability },
		finding: judge(heatProbability, effectiveCount(likelihoods)),
		darkShare: darkHours.length / made,
		whenShare: when / made,
		bothShare: both / made,
		usuallyDark: rangeOf(darkHours),
		usuallyBack: rangeOf(backHours),
		...readMoment(scenario, report)
	};
}
