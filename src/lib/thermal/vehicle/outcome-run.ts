import type { Step } from '../solve/stepper';
import type { Scenario } from '../types';
import { fillMinutes } from './fill-minutes';
import { FAILURE_WORDS, VehicleRun } from './vehicle-run';
import type { Standing, StepSink } from './step-sink';

/** What a run comes to when nobody draws it. */
export interface Outcome {
	/** The battery went dark at least once. */
	cutsOut: boolean;
	/** Highest reading of what the BMS watches on the grid of minutes, °C. */
	peakSensorC: number;
	/** How long the discharge latch stood open, h. */
	darkHours: number;
	/** What the charger would have put in while the charge latch was open, but not more than the battery had room for, Ah. */
	missedAh: number;
}

/** Keeps the peak of what the BMS watches, the time in the dark, and of the cells a value each so many minutes. */
class OutcomeSink implements StepSink {
	peakSensorC = -Infinity;
	cells: Float64Array | null = null;
	everyMin = 1;
	private readonly cellsNode: number;
	private readonly boardNode: number;
	private scratch = new Float64Array(0);
	private watched: readonly number[] = [];

	constructor(names: readonly string[]) {
		this.cellsNode = names.indexOf('cells');
		this.boardNode = names.indexOf('board');
	}

	begin({ bms }: Scenario, cells: Float64Array | null, everyMin: number): void {
		this.peakSensorC = -Infinity;
		this.cells = cells;
		this.everyMin = everyMin;
		this.watched = {
			cells: [this.cellsNode],
			board: [this.boardNode],
			hotter: [this.cellsNode, this.boardNode]
		}[bms.sensor];
	}

	takeStep(step: Step, _standing: Standing, minute: number, last: number): void {
		if (minute === last) return;
		for (let k = 0; k < this.watched.length; k++) {
			this.peakSensorC = fillMinutes(step, this.watched[k]!, minute, last, null, this.peakSensorC);
		}
		if (this.cells !== null) this.keepCells(step, this.cells, minute, last);
	}

	takeEnd(temps: Float64Array, _standing: Standing, minute: number): void {
		for (const node of this.watched) this.peakSensorC = Math.max(this.peakSensorC, temps[node]!);
		if (this.cells !== null && minute % this.everyMin === 0)
			this.cells[minute / this.everyMin] = temps[this.cellsNode]!;
	}

	private keepCells(step: Step, cells: Float64Array, minute: number, last: number): void {
		const first = Math.ceil(minute / this.everyMin) * this.everyMin;
		if (first >= last) return;
		if (this.scratch.length < last - minute) this.scratch = new Float64Array(2 * (last - minute));
		for (let at = first; at < last; at += this.everyMin) {
			fillMinutes(step, this.cellsNode, at, at + 1, this.scratch, -Infinity, 0);
			cells[at / this.everyMin] = this.scratch[0]!;
		}
	}
}

/** A run that could not be finished, among many that could. */
export class RunFailedError extends Error {
	override readonly name = 'RunFailedError';
}

interface Lane {
	run: VehicleRun;
	sink: OutcomeSink;
}

function makeLane(shielded: boolean): Lane {
	const run = new VehicleRun(shielded, false);
	return { run, sink: new OutcomeSink(run.stepper.names) };
}

/** Runs scenario after scenario on the same memory, for their outcomes alone. */
export class OutcomeRunner {
	private readonly lanes = { bare: makeLane(false), shielded: makeLane(true) };

	/**
	 * @param cells where the cells' temperature goes, one value each `everyMin` minutes from the start; or null
	 * @throws RunFailedError with the reason, when a run cannot be finished
	 */
	run(scenario: Scenario, cells: Float64Array | null = null, everyMin = 1): Outcome {
		const { run, sink } = scenario.shield ? this.lanes.shielded : this.lanes.bare;
		sink.begin(scenario, cells, everyMin);
		const failure = run.run(scenario, sink);
		if (failure) throw new RunFailedError(FAILURE_WORDS[failure]);
		return {
			cutsOut: run.bms.events.some(({ side, kind }) => side === 'discharge' && kind === 'cut'),
			peakSensorC: sink.peakSensorC,
			darkHours: this.sumDark(run, scenario),
			missedAh: Math.min(run.refusedAh, (1 - run.soc) * scenario.battery.capacityAh)
		};
	}

	private sumDark(run: VehicleRun, scenario: Scenario): number {
		let hours = 0;
		let since: number | null = null;
		for (const { side, kind, hour } of run.bms.events) {
			if (side !== 'discharge') continue;
			if (kind === 'cut') since = hour;
			else if (since !== null) {
				hours += hour - since;
				since = null;
			}
		}
		let endHour = scenario.start.hour;
		for (const { minutes } of scenario.legs) endHour += minutes / 60;
		return since === null ? hours : hours + endHour - since;
	}
}
