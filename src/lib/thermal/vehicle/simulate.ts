import { EnergyAccount } from '../solve/energy-account';
import { Integrator, type Failure } from '../solve/integrator';
import type { Step } from '../solve/rosenbrock';
import type { Leg, Scenario, SimulationReport, SimulationResult } from '../types';
import { Bms, type PlannedChange } from './bms';
import { planChargeSpan, readSoc } from './charge';
import { ambientTempC } from './climate';
import { MinuteRecord, type Standing } from './minute-record';
import { parseScenario } from './parse-scenario';
import { compileVehicle, type VehicleSystem } from './vehicle-system';

const S_PER_H = 3600;
const S_PER_MIN = 60;
/** Two instants nearer than this are one, s. */
const SAME_INSTANT_S = 1e-6;
/** The most that is suggested for the first step after a sudden change, s. */
const FIRST_STEP_S = 2;
/** A decaying current is followed from its onset with steps of this share of its time constant. */
const DECAY_SHARE = 0.25;
const CLOSED = { chargeOpen: false, dischargeOpen: false };
const MOST_STEPS = 400_000;

/**
 * Error allowed in one step, K. The hot nodes are felt by the battery only through what they give; the battery's own
 * are followed closely enough for their small heats to close.
 */
const TOLERANCE_K: Partial<Record<string, number>> = {
	engine: 2e-3,
	exhaust: 4e-3,
	bay: 2e-3,
	bonnet: 1.5e-4
};
const BATTERY_TOLERANCE_K = 4e-5;
/** A run whose energy does not close is made again, so much tighter as it was off, with some to spare. */
const CLOSES = 1e-6;
const TO_SPARE = 0.4;
const LEAST_TIGHTENING = 0.01;
const MOST_RUNS = 4;

const FAILURES: Record<Failure, string> = {
	impossible_temperature:
		'A temperature left every possible range: the fields describe more heat than can get away.',
	step_too_small: 'The temperatures change too fast to be followed.',
	too_many_steps: `The day needs more than ${MOST_STEPS} steps: a latch or a temperature moves too often.`
};

/** One run through all legs. */
class Run {
	private timeS = 0;
	private soc: number;
	private readonly standing: Standing;
	private refusedAh = 0;
	private readonly vehicle: VehicleSystem;
	private readonly bms: Bms;
	private readonly integrator: Integrator;
	private readonly energy: EnergyAccount;
	private readonly record: MinuteRecord;
	private readonly temps: Float64Array;
	private pending: readonly PlannedChange[] = [];

	constructor(
		private readonly scenario: Scenario,
		tightening: number
	) {
		const { start, climate, legs, bms } = scenario;
		this.soc = start.soc;
		this.vehicle = compileVehicle(scenario, legs[0]!);
		const { network } = this.vehicle;
		const sensorNodes = { cells: ['cells'], board: ['board'], hotter: ['cells', 'board'] }[bms.sensor];
		this.bms = new Bms(
			bms,
			sensorNodes.map((name) => network.indexOf(name))
		);
		const toleranceK = Float64Array.from(
			network.storedNames,
			(name) => tightening * (TOLERANCE_K[name] ?? BATTERY_TOLERANCE_K)
		);
		this.integrator = new Integrator(network, { toleranceK, mostSteps: MOST_STEPS });
		this.energy = new EnergyAccount(network.size, this.integrator.stepper);
		this.standing = {
			span: planChargeSpan(scenario, legs[0]!, start.soc, CLOSED),
			spanStartS: 0,
			bms: this.bms
		};
		const totalMinutes = legs.reduce((sum, leg) => sum + leg.minutes, 0);
		this.record = new MinuteRecord(scenario, network.storedNames, totalMinutes);
		this.temps = new Float64Array(network.size).fill(ambientTempC(start.hour, climate));
	}

	run(): SimulationResult {
		this.bms.settle(0, this.hourAt(0), this.temps);
		let minutesBefore = 0;
		for (const [index, leg] of this.scenario.legs.entries()) {
			minutesBefore += leg.minutes;
			if (index > 0) this.vehicle.startLeg(leg);
			this.integrator.restart(FIRST_STEP_S);
			const failure = this.runLeg(leg, minutesBefore * S_PER_MIN);
			if (failure) return this.reportFailure(failure);
		}
		this.record.fillEnd(this.temps, this.standing);
		return this.reportDone();
	}

	/** Runs to the end of a leg, span by span of the battery's current. */
	private runLeg(leg: Leg, legEndS: number): Failure | null {
		do {
			this.beginSpan(leg);
			const failure = this.runSpan(legEndS);
			if (failure) return failure;
			this.endSpan();
		} while (this.timeS < legEndS);
		return null;
	}

	private beginSpan(leg: Leg): void {
		const span = planChargeSpan(this.scenario, leg, this.soc, {
			chargeOpen: this.bms.isOpen('charge'),
			dischargeOpen: this.bms.isOpen('discharge')
		});
		this.standing.span = span;
		this.standing.spanStartS = this.timeS;
		this.vehicle.setSpan(span, this.timeS);
		if (span.decayPerS > 0) this.integrator.restart(DECAY_SHARE / span.decayPerS);
	}

	private endSpan(): void {
		const { span, spanStartS } = this.standing;
		const lastedS = this.timeS - spanStartS;
		// A span shorter than a rounding error of the clock still ends where it ends, or it would begin again for ever.
		this.soc = this.timeS >= spanStartS + span.lastsS ? span.socAtEnd : readSoc(span, lastedS);
		this.refusedAh += (span.refusedA * lastedS) / S_PER_H;
	}

	/** Runs until the leg or the span ends or a latch moves; whole hours, where the air's slope changes, are stops too. */
	private runSpan(legEndS: number): Failure | null {
		const spanEndS = Math.min(legEndS, this.standing.spanStartS + this.standing.span.lastsS);
		while (this.timeS < spanEndS) {
			const endS = Math.min(spanEndS, this.nextWholeHourS(), this.bms.nextDeadlineS());
			if (endS - this.timeS > SAME_INSTANT_S) {
				const advance = this.integrator.advance(this.timeS, endS, this.temps, this.watch, this.accept);
				this.timeS = advance.timeS;
				if (advance.reached === 'failed') return advance.failure;
				if (advance.reached === 'stop' && this.applyPending()) return null;
			} else {
				this.timeS = endS;
			}
			if (this.bms.settle(this.timeS, this.hourAt(this.timeS), this.temps)) {
				this.integrator.restart(FIRST_STEP_S);
				return null;
			}
		}
		return null;
	}

	private readonly watch = (step: Step): number | null => {
		const found = this.bms.findChange(step);
		if (!found) return null;
		this.pending = found.changes;
		return found.share;
	};

	private readonly accept = (step: Step): void => {
		this.energy.book(step, this.vehicle.network);
		this.record.fillStep(step, this.standing);
	};

	private applyPending(): boolean {
		let moved = false;
		for (const { latch, change } of this.pending) {
			moved = this.bms.apply(latch, change, this.timeS, this.hourAt(this.timeS)) || moved;
		}
		if (moved) this.integrator.restart(FIRST_STEP_S);
		return moved;
	}

	private hourAt(timeS: number): number {
		return this.scenario.start.hour + timeS / S_PER_H;
	}

	private nextWholeHourS(): number {
		const { hour } = this.scenario.start;
		const next = Math.floor(this.hourAt(this.timeS + SAME_INSTANT_S)) + 1;
		return (next - hour) * S_PER_H;
	}

	private reportFailure(failure: Failure): SimulationResult {
		return {
			status: 'failed',
			reason: FAILURES[failure],
			atHour: this.hourAt(this.timeS),
			steps: this.integrator.steps,
			evaluations: this.integrator.stepper.evaluations
		};
	}

	private reportDone(): SimulationResult {
		const { record, integrator, bms, temps, energy } = this;
		const { peaks, peakMinute } = record.findPeaks();
		const names = this.vehicle.network.storedNames;
		const report: SimulationReport = {
			peakCellsC: peaks.cells,
			peakAtHour: this.hourAt(peakMinute * S_PER_MIN),
			peaks,
			end: { ...record.readRow((name) => temps[names.indexOf(name)]!), soc: this.soc },
			events: bms.events,
			hourly: record.readHours(),
			energy: { maxRelativeImbalance: Math.max(...energy.relativeImbalances(this.vehicle.network)) },
			steps: integrator.steps,
			evaluations: integrator.stepper.evaluations
		};
		return { status: 'done', report, minutes: record.minutes, chargeRefusedAh: this.refusedAh };
	}
}

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
	let steps = 0;
	let evaluations = 0;
	let tightening = 1;
	let result!: SimulationResult;
	for (let runs = 0; runs < MOST_RUNS; runs++) {
		result = new Run(scenario, tightening).run();
		if (result.status === 'failed') return result;
		steps += result.report.steps;
		evaluations += result.report.evaluations;
		const { maxRelativeImbalance } = result.report.energy;
		if (maxRelativeImbalance <= CLOSES) break;
		tightening *= Math.max(LEAST_TIGHTENING, (TO_SPARE * CLOSES) / maxRelativeImbalance);
	}
	if (result.status === 'done') Object.assign(result.report, { steps, evaluations });
	return result;
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
