import { parseScenario } from '$lib/thermal';
import type { FitTrace, TraceToFit } from '$lib/thermal/fit';
import {
	ambientFromTrace,
	dayPlanFromLegs,
	minuteBins,
	scenarioLegs,
	type BinnedTrace,
	type TraceLeg
} from '$lib/thermal/traces';
import type { Assessment, Trace } from '../db/models';
import { startHourOf } from '../presenters/traces';
import { openBins } from './trace-bins';

const MINUTE_S = 60;
const LONGEST_LEG_MINUTES = 24 * 60;

/** Means of a minute each, as a fit takes them. */
function toFitTrace(bins: BinnedTrace, startedAtHour: number): FitTrace {
	const { binCount, channels } = minuteBins(bins);
	return {
		startedAtHour,
		timeS: Float64Array.from({ length: binCount }, (_, at) => (at + 0.5) * MINUTE_S),
		channels: Object.fromEntries(
			Object.entries(channels).map(([channel, { mean }]) => [channel, Float64Array.from(mean)])
		)
	};
}

/** Places of legs in a scenario, where a leg of more than a day stands as several. */
function placesOf(legs: readonly TraceLeg[], heldOut: readonly number[]): number[] {
	let place = 0;
	return legs.flatMap(({ startS, endS }, at) => {
		const parts = Math.ceil((endS - startS) / MINUTE_S / LONGEST_LEG_MINUTES);
		const places = Array.from({ length: parts }, (_, part) => place + part);
		place += parts;
		return heldOut.includes(at + 1) ? places : [];
	});
}

/** A trace with the scenario that its mount was assessed with, its legs as the day, and the air as it was measured. */
export async function traceToFit(
	trace: Trace,
	assessment: Assessment,
	heldOutLegs: readonly number[]
): Promise<TraceToFit> {
	const bins = await openBins(trace);
	const startHour = startHourOf(trace)!;
	const known = parseScenario(assessment.inputs.scenario);
	const { soc: startSoc } = known.start;
	const plan = dayPlanFromLegs(bins, trace.legs, {
		...{ name: trace.name, startSoc, chargerMaxA: 0, startHour },
		loadA: known.legs.find(({ engineOn }) => !engineOn)?.loadA ?? 0
	});
	const climate = ambientFromTrace(bins, startHour)?.climate ?? {};
	const { scenario } = assessment.inputs;
	return {
		trace: toFitTrace(bins, startHour),
		scenario: parseScenario({
			...scenario,
			climate: { ...scenario.climate, ...climate },
			start: { ...scenario.start, hour: startHour },
			legs: scenarioLegs(plan)
		}),
		heldOutLegs: placesOf(trace.legs, heldOutLegs)
	};
}
