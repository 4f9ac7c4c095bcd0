import type { Step } from '../solve/stepper';
import type { Scenario } from '../types';
import { fillEvery, raiseHighest } from './fill-minutes';
import { FAILURE_WORDS, VehicleRun } from './vehicle-run';
import { findEndHour, findSpans, sumHours, type HourSpan } from './spans';
import type { Standing, StepSink } from './step-sink';

/** What a run comes to when nobody draws it. */
export interface Outcome {
	/** The battery went dark at least once. */
	cutsOut: boolean;
	/** Highest reading of what the BMS watches on the grid of minutes, °C. */
	peakSensorC: number;
	/** Hottest cells while charging current flowed, on the grid of minutes, °C; −Infinity when none did. */
	peakChargingC: number;
	/** How long the discharge latch stood open, h. */
	darkHours: number;
	/** What the charger would have put in while the charge latch was open, as far as the battery had room for it, Ah. */
	missedAh: number;
	/** Each time that it was dark, in order. */
	darkSpans: HourSpan[];
}

/** Keeps the peak of what the BMS watches, the time in the dark, and of the cells a value each so many minutes. */
class OutcomeSink implements StepSink {
	/** Of each node that is watched, °C. */
	readonly highestC: Float64Array;
	watched: readonly number[] = [];
	/** Of the cells alone, while they are charged, at their node's place, °C. */
	private readonly chargingC: Float64Array;
	private cells: Float64Array | null = null;
	private everyMin = 1;
	private readonly cellsNode: number;
	private readonly boardNode: number;

	constructor(names: readonly string[]) {
		this.highestC = new Float64Array(names.length);
		this.chargingC = new Float64Array(names.length);
		this.cellsNode = names.indexOf('cells');
		this.boardNode = names.indexOf('board');
	}

	begin({ bms }: Scenario, cells: Float64Array | null, everyMin: number): void {
		this.highestC.fill(-Infinity);
		this.chargingC.fill(-Infinity);
		this.cells = cells;
		this.everyMin = everyMin;
		this.watched = {
			cells: [this.cellsNode],
			board: [this.boardNode],
			hotter: [this.cellsNode, this.boardNode]
		}[bms.sensor];
	}

	get peakChargingC(): number {
		return this.chargingC[this.cellsNode]!;
	}

	takeStep(step: Step, { span }: Standing, minute: number, last: number): void {
		if (minute === last) return;
		if (span.currentA > 0) raiseHighest(step, this.cellsNode, minute, last, this.chargingC);
		for (let k = 0; k < this.watched.length; k++) {
			raiseHighest(step, this.watched[k]!, minute, last, this.highestC);
		}
		if (this.cells !== null) fillEvery(step, this.cellsNode, minute, last, this.everyMin, this.cells);
	}

	takeEnd(temps: Float64Array, _standing: Standing, minute: number): void {
		for (const node of this.watched) {
			this.highestC[node] = Math.max(this.highestC[node]!, temps[node]!);
		}
		if (this.cells !== null && minute % this.everyMin === 0) {
			this.cells[minute / this.everyMin] = temps[this.cellsNode]!;
		}
	}

	findPeakSensorC(): number {
		let peakC = -Infinity;
		for (const node of this.watched) peakC = Math.max(peakC, this.highestC[node]!);
		return peakC;
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
		const darkSpans = findSpans(run.bms.events, 'discharge', findEndHour(scenario));
		return {
			cutsOut: darkSpans.length > 0,
			peakSensorC: sink.findPeakSensorC(),
			darkHours: sumHours(darkSpans),
			darkSpans,
			missedAh: run.missedAh,
			peakChargingC: sink.peakChargingC
		};
	}
}
