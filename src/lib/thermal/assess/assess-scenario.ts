import type { HeatLimits } from '../chemistries/guard';
import type { MinuteSeries, Scenario, SimulationResult } from '../types';
import { parseScenario } from '../vehicle/parse-scenario';
import { runScenario } from '../vehicle/simulate';
import { findSpans, sumHours } from '../vehicle/spans';
import { ENGINE_VERSION } from '../version';
import { thinCurves } from './curves';
import { keepLedger } from './heat-ledger';
import { weighHeat } from './heat-limits';
import { countMissedHours } from './missed-charge';
import type { Assessment, DoneAssessment, LegSpan } from './types';
import { judgeHeat, judgeOutcome } from './verdict';

type DoneRun = Extract<SimulationResult, { status: 'done' }>;

const MINUTES_PER_H = 60;

export interface AssessOptions {
	/** What each leg is to people, in the order of the legs. */
	legKinds?: readonly LegSpan['kind'][];
	/** Of a battery that nothing switches off: it is judged by them, and the latches of the scenario are not asked. */
	heatLimits?: HeatLimits | null;
}

/** Highest reading of what the BMS watches, on the grid of minutes, °C. */
function findPeakSensorC({ bms }: Scenario, { nodes, count }: MinuteSeries): number {
	const watched = { cells: [nodes.cells], board: [nodes.board], hotter: [nodes.cells, nodes.board] }[
		bms.sensor
	];
	let peakC = -Infinity;
	for (const series of watched) {
		for (let minute = 0; minute < count; minute++) peakC = Math.max(peakC, series[minute]!);
	}
	return peakC;
}

function layOutLegs({ legs, start }: Scenario, kinds: AssessOptions['legKinds']): LegSpan[] {
	let fromHour = start.hour;
	return legs.map(({ minutes, engineOn, speedKmh, surface, bonnetOpen }, index) => {
		const toHour = fromHour + minutes / MINUTES_PER_H;
		const kind = kinds?.[index];
		const span = { ...(kind ? { kind } : {}), fromHour, toHour, engineOn, speedKmh, surface, bonnetOpen };
		fromHour = toHour;
		return span;
	});
}

function findPeakMinute({ nodes, count }: MinuteSeries): number {
	let peak = 0;
	for (let minute = 1; minute < count; minute++) if (nodes.cells[minute]! > nodes.cells[peak]!) peak = minute;
	return peak;
}

function describeSpans(run: DoneRun, endHour: number) {
	const { events } = run.report;
	const darkSpans = findSpans(events, 'discharge', endHour);
	const last = darkSpans.at(-1);
	const firstReset = darkSpans.find((span) => !span.open)?.toHour ?? null;
	return {
		darkSpans,
		darkHours: sumHours(darkSpans),
		cutAtHour: darkSpans[0]?.fromHour ?? null,
		resetAtHour: firstReset,
		backByItself: last !== undefined && !last.open,
		chargeSpans: findSpans(events, 'charge', endHour)
	};
}

/** Where the battery goes dark and where it stops charging; without a BMS, where its maker draws the line. */
function findCeilings({ bms }: Scenario, limits: AssessOptions['heatLimits']) {
	return limits
		? { useC: limits.highestUseC, chargeC: limits.highestChargeC }
		: { useC: bms.discharge.cut, chargeC: bms.charge.cut };
}

function assessRun(scenario: Scenario, run: DoneRun, options: AssessOptions): DoneAssessment {
	const { report, minutes } = run;
	const legs = layOutLegs(scenario, options.legKinds);
	const endHour = legs.at(-1)!.toHour;
	const spans = describeSpans(run, endHour);
	const peakSensorC = findPeakSensorC(scenario, minutes);
	const { chargeMissedAh } = run;
	const ceilings = findCeilings(scenario, options.heatLimits);
	const headroomK = ceilings.useC - peakSensorC;
	const leadAcid = options.heatLimits ? weighHeat(scenario, minutes, options.heatLimits) : null;
	const { soc: endSoc, ...end } = report.end;
	return {
		status: 'done',
		verdict: leadAcid
			? judgeHeat({ chargedTooHot: leadAcid.hoursAboveChargeLimit > 0 }, headroomK)
			: judgeOutcome(
					scenario,
					{
						...{ cutsOut: spans.darkSpans.length > 0, peakSensorC, missedAh: chargeMissedAh },
						peakChargingC: -Infinity
					},
					null
				),
		headroomK,
		chargeHeadroomK: ceilings.chargeC - peakSensorC,
		...spans,
		chargeMissedAh,
		chargeMissedHours: countMissedHours(scenario, minutes),
		peakCellsC: report.peakCellsC,
		peakAtHour: report.peakAtHour,
		peakSensorC,
		peaks: report.peaks,
		end,
		endSoc,
		endHour,
		events: report.events,
		ledger: keepLedger(scenario, minutes, findPeakMinute(minutes)),
		curves: thinCurves(scenario, minutes),
		legs,
		engineVersion: ENGINE_VERSION,
		energyMaxRelativeImbalance: report.energy.maxRelativeImbalance,
		steps: report.steps,
		evaluations: report.evaluations,
		hourly: report.hourly,
		...(leadAcid ? { leadAcid } : {})
	};
}

/**
 * Runs a scenario and says what it means for whoever depends on the battery.
 *
 * Cuts out: the discharge latch opened. Runs close: less than 5 K between the cut and the peak of what the BMS watches,
 * or charging stopped by heat for at least a hundredth of the capacity. Otherwise it rides the day out. The 5 K and the
 * hundredth are engineering judgement. A battery without a BMS is judged by its limits, as judgeHeat says.
 *
 * @param input a scenario as people or programs write it
 * @param options what the legs are to people; the limits of a battery that nothing switches off
 * @returns the assessment, or status `failed` with the reason when the run could not be finished
 * @throws ScenarioError when the input is not a possible scenario
 * Validity: as simulateScenario; one day, no spread of the inputs.
 * Source: the thermal model; the rules for the verdict are our own.
 * @example
 * assessScenario({ legs: [{ minutes: 60 }] }).verdict // 'rides-it-out'
 */
export function assessScenario(input: unknown, options: AssessOptions = {}): Assessment {
	const scenario = parseScenario(input);
	const run = runScenario(scenario);
	return run.status === 'failed'
		? { status: 'failed', reason: run.reason }
		: assessRun(scenario, run, options);
}
