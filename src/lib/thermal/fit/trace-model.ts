import { ScenarioError } from '../errors';
import type { Failure } from '../solve/integrator';
import { NODE_NAMES, type NodeName, type Scenario } from '../types';
import { copyScenario } from '../uncertainty/draw-scenario';
import { checkConsistency } from '../vehicle/check-consistency';
import { outsideTempC } from '../vehicle/measured-course';
import { VehicleRun } from '../vehicle/vehicle-run';
import { setCoefficient, type Coefficient } from './coefficients';
import { condenseCourse } from './condense-course';
import { listStartParameters, placeStarts, type StartParameter, type UnmeasuredStart } from './start-temps';
import { CHANNEL_NODES, FIT_CHANNELS, type FitTrace } from './trace';
import { TraceSink } from './trace-sink';

/** Errors of a step must be small against noise over many readings, not against one kelvin: a tenth of what is allowed. */
const TOLERANCE_SHARE = 0.1;
const HOURS_A_DAY = 24;

/** A trace with the scenario that it is a day of. */
export interface TraceOfScenario {
	trace: FitTrace;
	scenario: Scenario;
	start: UnmeasuredStart;
}

/** Keeps the temperatures at the end of a run. */
class EndSink extends TraceSink {
	endC: Float64Array = new Float64Array();

	override takeEnd(temps: Float64Array): void {
		this.endC = Float64Array.from(temps);
	}
}

function isPossible(scenario: Scenario): boolean {
	try {
		checkConsistency(scenario);
		return true;
	} catch (error) {
		if (error instanceof ScenarioError) return false;
		throw error;
	}
}

/** Foretells the readings of one trace. */
export class TraceModel {
	readonly starts: readonly StartParameter[];
	/** How often the vehicle was run. */
	runs = 0;
	private readonly scenario: Scenario;
	private readonly run: VehicleRun;
	private readonly sink: TraceSink;
	/** As it was measured, without what is tried on it. */
	private readonly course: ReturnType<typeof condenseCourse>;
	private airC: number;

	constructor(
		private readonly of: TraceOfScenario,
		private readonly coefficients: readonly Coefficient[]
	) {
		this.scenario = copyScenario(of.scenario);
		this.scenario.start.hour = of.trace.startedAtHour;
		this.course = condenseCourse(of.trace, this.scenario);
		this.scenario.measured = { ...this.course };
		this.airC = outsideTempC(this.scenario, this.scenario.start.hour);
		this.run = new VehicleRun(this.scenario.shield !== null, false, TOLERANCE_SHARE);
		const { names } = this.run.stepper;
		this.starts = listStartParameters(of.trace, of.start, (node) => names.includes(node));
		const nodes = FIT_CHANNELS.map((channel) => names.indexOf(CHANNEL_NODES[channel])).filter(
			(at) => at >= 0
		);
		this.sink = new TraceSink(nodes, of.trace.timeS);
	}

	/** Whether the run has the node that a channel is held against. */
	foretells(channel: keyof typeof CHANNEL_NODES): boolean {
		return this.run.stepper.names.includes(CHANNEL_NODES[channel]);
	}

	/**
	 * One row a channel that the run has a node for, in the order of FIT_CHANNELS, °C at the times of the trace.
	 *
	 * @param values the coefficients; null leaves one as the scenario has it
	 * @param startValues the start temperatures in the order of `starts`
	 * @returns NaN everywhere where the coefficients contradict one another or the run cannot be finished
	 */
	predict(values: readonly (number | null)[], startValues: readonly number[]): readonly Float64Array[] {
		if (!this.prepare(values, startValues)) return this.sink.rows;
		return this.rowsAfter(this.run.run(this.scenario, this.sink));
	}

	/** The same, leg by leg. */
	*predictByLegs(
		values: readonly (number | null)[],
		startValues: readonly number[]
	): Generator<void, readonly Float64Array[]> {
		if (!this.prepare(values, startValues)) return this.sink.rows;
		return this.rowsAfter(yield* this.run.runByLegs(this.scenario, this.sink));
	}

	/** Sets what the next run is made with; false where that contradicts itself. */
	private prepare(values: readonly (number | null)[], startValues: readonly number[]): boolean {
		const scenario = this.scenario;
		this.coefficients.forEach((coefficient, at) => {
			const value = values[at] ?? null;
			const own = this.of.scenario[coefficient.group] as Readonly<Record<string, number>> | null;
			setCoefficient(scenario, coefficient, value ?? own?.[coefficient.key] ?? NaN);
		});
		this.sink.begin();
		if (!isPossible(scenario)) return false;
		const settledC = this.of.start.kind === 'stood' ? this.settle(this.of.start.hours) : {};
		scenario.measured!.startC = placeStarts(this.starts, startValues, this.airC, settledC);
		this.runs++;
		return true;
	}

	private rowsAfter(failure: Failure | null): readonly Float64Array[] {
		if (failure !== null) this.sink.begin();
		return this.sink.rows;
	}

	/** How long the legs are, s. */
	get lengthS(): number {
		return 60 * this.of.scenario.legs.reduce((sum, { minutes }) => sum + minutes, 0);
	}

	/** The same on air that is warmer by 1 K at an instant and by less up to `withinS` before and after. */
	predictWarmer(
		values: readonly (number | null)[],
		startValues: readonly number[],
		atS: number,
		withinS: number
	): readonly Float64Array[] {
		const { everyS, valuesC } = this.course.air;
		const warmer = valuesC.map((value, at) => value + Math.max(1 - Math.abs(at * everyS - atS) / withinS, 0));
		this.useAir(warmer);
		const rows = this.predict(values, startValues);
		this.useAir(valuesC);
		return rows;
	}

	private useAir(valuesC: Float64Array): void {
		this.scenario.measured!.air = { everyS: this.course.air.everyS, valuesC };
		this.airC = valuesC[0]!;
	}

	/** What the nodes come to when the vehicle stands before the trace begins, the air as far off the day's curve as at the start. */
	private settle(hours: number): Partial<Record<NodeName, number>> {
		const { scenario } = this;
		const off = this.airC - outsideTempC({ ...scenario, measured: {} }, scenario.start.hour);
		const night = copyScenario(scenario);
		const fromHour = scenario.start.hour - hours;
		night.start.hour = fromHour - HOURS_A_DAY * Math.floor(fromHour / HOURS_A_DAY);
		night.climate.tMax += off;
		delete night.measured;
		night.legs = [
			{ ...scenario.legs[0]!, minutes: 60 * hours, engineOn: false, speedKmh: 0, bonnetOpen: false, loadA: 0 }
		];
		const sink = new EndSink([], new Float64Array());
		this.runs++;
		if (this.run.run(night, sink) !== null) return {};
		const { names } = this.run.stepper;
		return Object.fromEntries(
			NODE_NAMES.flatMap((node) => {
				const at = names.indexOf(node);
				return at < 0 ? [] : [[node, sink.endC[at]!]];
			})
		);
	}
}
