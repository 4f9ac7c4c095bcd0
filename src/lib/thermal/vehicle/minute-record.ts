import { highestBound } from '../solve/crossings';
import type { Step } from '../solve/stepper';
import {
	NODE_NAMES,
	type HourlyRow,
	type MinuteSeries,
	type NodeName,
	type NodeValues,
	type Scenario
} from '../types';
import { fillCharge } from './charge';
import { fillAmbient } from './climate';
import { outsideTempC } from './measured-course';
import { fillMinutes } from './fill-minutes';
import type { Standing, StepSink } from './step-sink';

const MINUTES_PER_H = 60;
/** Sums of leg lengths carry rounding errors; a grid point this near the end still counts, min. */
const ROUNDING_MIN = 1e-7;

/** Raises the highest value of a node to that of some minutes of its column. */
function raise(highestC: Float64Array, node: number, column: Float64Array, from: number, to: number): void {
	let high = highestC[node]!;
	for (let at = from; at < to; at++) if (column[at]! > high) high = column[at]!;
	highestC[node] = high;
}

/** How many grid points a run has: whole minutes, and the start. */
export function countMinutes({ legs }: Scenario): number {
	let totalMinutes = 0;
	for (const leg of legs) totalMinutes += leg.minutes;
	return Math.floor(totalMinutes + ROUNDING_MIN) + 1;
}

/** Air outside, state of charge, current. */
const OTHER_COLUMNS = 3;

/** Fills the grid of minutes from the steps as they are taken. */
export class MinuteRecord implements StepSink {
	readonly minutes: MinuteSeries;
	/** One column a solved node, in the order of the solver. */
	private readonly columns: readonly Float64Array[];
	/** Of each solved node on the minutes filled so far, °C. */
	private readonly highestC: Float64Array;

	constructor(
		private readonly scenario: Scenario,
		private readonly storedNames: readonly string[],
		count: number
	) {
		const startHour = scenario.start.hour;
		const memory = new Float64Array((NODE_NAMES.length + OTHER_COLUMNS) * count);
		let next = 0;
		const column = () => memory.subarray(next++ * count, next * count);
		const nodes = {} as Record<NodeName, Float64Array>;
		for (const name of NODE_NAMES) nodes[name] = column();
		this.columns = storedNames.map((name) => nodes[name as NodeName]);
		this.highestC = new Float64Array(storedNames.length).fill(-Infinity);
		const ambient = column();
		if (scenario.measured?.air) {
			for (let at = 0; at < count; at++) ambient[at] = outsideTempC(scenario, startHour + at / MINUTES_PER_H);
		} else fillAmbient(ambient, startHour, scenario.climate);
		if (!scenario.shield) nodes.shield.fill(ambient[0]!);
		this.minutes = {
			startHour,
			count,
			nodes,
			ambient,
			soc: column(),
			currentA: column(),
			chargeOpen: new Uint8Array(count),
			dischargeOpen: new Uint8Array(count)
		};
	}

	takeStep(step: Step, _standing: Standing, minute: number, last: number): void {
		if (minute === last) return;
		const { columns, highestC } = this;
		for (let node = 0; node < columns.length; node++) {
			const column = columns[node]!;
			fillMinutes(step, node, minute, last, column);
			if (highestBound(step, node) > highestC[node]!) raise(highestC, node, column, minute, last);
		}
	}

	takeStanding(
		{ span, spanStartS, chargeOpen, dischargeOpen }: Standing,
		minute: number,
		last: number
	): void {
		if (minute === last) return;
		const { minutes } = this;
		fillCharge(span, spanStartS, minutes.soc, minutes.currentA, minute, last);
		if (chargeOpen) minutes.chargeOpen.fill(1, minute, last);
		if (dischargeOpen) minutes.dischargeOpen.fill(1, minute, last);
	}

	/** Fills what is left once the last leg has ended: at most its last instant. */
	takeEnd(temps: Float64Array, standing: Standing, minute: number): void {
		const { columns, highestC, minutes } = this;
		if (minute === minutes.count) return;
		for (let node = 0; node < columns.length; node++) {
			columns[node]!.fill(temps[node]!, minute, minutes.count);
			raise(highestC, node, columns[node]!, minute, minutes.count);
		}
		this.takeStanding(standing, minute, minutes.count);
	}

	/** The highest temperature of each node on the grid. */
	findPeaks(): NodeValues {
		return this.readRow((name) => this.highestC[this.storedNames.indexOf(name)]!);
	}

	/** The start and every whole hour after it. */
	readHours(): HourlyRow[] {
		const { nodes, soc, count, startHour } = this.minutes;
		const rows: HourlyRow[] = [];
		for (let minute = 0; minute < count; minute += MINUTES_PER_H) {
			const row = this.readRow((name) => nodes[name][minute]!) as HourlyRow;
			row.hour = startHour + minute / MINUTES_PER_H;
			row.soc = soc[minute]!;
			rows.push(row);
		}
		return rows;
	}

	/** One value a node; null for a shield that is not there. */
	readRow(read: (name: NodeName) => number): NodeValues {
		const { shield } = this.scenario;
		return {
			engine: read('engine'),
			exhaust: read('exhaust'),
			bay: read('bay'),
			bonnet: read('bonnet'),
			enclosure: read('enclosure'),
			shield: shield ? read('shield') : null,
			tray: read('tray'),
			case: read('case'),
			cells: read('cells'),
			board: read('board')
		};
	}
}
