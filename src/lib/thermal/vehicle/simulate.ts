import type { Failure } from '../solve/integrator';
import type { NodeName, Scenario, SimulationReport, SimulationResult } from '../types';
import { countMinutes, MinuteRecord } from './minute-record';
import { parseScenario } from './parse-scenario';
import { FAILURE_WORDS, VehicleRun } from './vehicle-run';

const S_PER_MIN = 60;

function reportFailure(run: VehicleRun, failure: Failure): SimulationResult {
	return {
		status: 'failed',
		reason: FAILURE_WORDS[failure],
		atHour: run.hourAt(run.timeS),
		steps: run.integrator.steps,
		evaluations: run.stepper.evaluations
	};
}

function report(run: VehicleRun, record: MinuteRecord): SimulationReport {
	const { stepper, integrator, temps } = run;
	const at = (name: NodeName) => stepper.names.indexOf(name);
	const peaks = record.findPeaks();
	const peakMinute = record.minutes.nodes.cells.indexOf(peaks.cells);
	return {
		peakCellsC: peaks.cells,
		peakAtHour: run.hourAt(peakMinute * S_PER_MIN),
		peaks,
		end: { ...record.readRow((name) => temps[at(name)]!), soc: run.soc },
		events: run.bms.events,
		hourly: record.readHours(),
		energy: { maxRelativeImbalance: stepper.relativeImbalance() },
		steps: integrator.steps,
		evaluations: stepper.evaluations
	};
}

/** The runs are made once and used again: they hold no more than the memory of the steps. */
const RUNS = { bare: new VehicleRun(false, true), shielded: new VehicleRun(true, true) };

/**
 * Runs a scenario that parseScenario has made; saves checking it again when many are run.
 *
 * @param scenario whole scenario; not changed
 * @returns as simulateScenario
 * Validity: as simulateScenario.
 * Source: the thermal model.
 * @example
 * runScenario(defaultScenario([{ minutes: 60 }])).status; // 'done'
 */
export function runScenario(scenario: Scenario): SimulationResult {
	const run = scenario.shield ? RUNS.shielded : RUNS.bare;
	const record = new MinuteRecord(scenario, run.stepper.names, countMinutes(scenario));
	const failure = run.run(scenario, record);
	if (failure) return reportFailure(run, failure);
	return {
		status: 'done',
		report: report(run, record),
		minutes: record.minutes,
		chargeRefusedAh: run.refusedAh,
		chargeMissedAh: run.missedAh
	};
}

/**
 * Simulates a day plan: every temperature, the two BMS latches, the battery's charge.
 *
 *     C dT/dt = Σ heat in − Σ heat out + sources, node by node
 *
 * @param input a scenario as people or programs write it; absent groups and fields take the defaults, an absent or
 *   null shield is none
 * @returns with status `done`: the report (peaks on the one-minute grid from the start; `hourly` at the start and each
 *   full hour after it), the series of minutes (whole minutes since the start) and the charge refused in Ah;
 *   with status `failed`: the reason and the clock hour that was reached
 * @throws ScenarioError when the input is not a possible scenario
 * Validity: fields within the ranges of SCENARIO_FIELDS; at most 1,000 legs and 60 days.
 * Source: the thermal model; solver RODAS (Hairer, Wanner, Solving Ordinary Differential Equations II, 2nd ed., VI.4).
 * @example
 * const result = simulateScenario({ legs: [{ minutes: 240, engineOn: true, speedKmh: 90 }, { minutes: 240 }] });
 * result.report.peakCellsC; // 53.637
 */
export function simulateScenario(input: unknown): SimulationResult {
	return runScenario(parseScenario(input));
}
