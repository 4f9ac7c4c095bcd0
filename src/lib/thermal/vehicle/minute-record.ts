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
import { fillMinutes } from './fill-minutes';
import type { Standing, StepSink } from './step-sink';

const MINUTES_PER_H = 60;
/** Sums of leg lengths carry rounding errors; a grid point this near the end still counts, min. */
const ROUNDING_MIN = 1e-7;

function findHighest(temps: Float64Array): number {
	let high = -Infinity;
	for (let at = 0; at < temps.length; at++) if (temps[at]! > high) high = temps[at]!;
	return high;
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

	constructor(
		private readonly scenario: Scenario,
		storedNames: readonly string[],
		count: number
	) {
		const startHour = scenario.start.hour;
		const memory = new Float64Array((NODE_NAMES.length + OTHER_COLUMNS) * count);
		let next = 0;
		const column = () => memory.subarray(next++ * count, next * count);
		const nodes = {} as Record<NodeName, Float64Array>;
		for (const name of NODE_NAMES) nodes[name] = column();
		this.columns = storedNames.map((name) => nodes[name as NodeName]);
		const ambient = column();
		fillAmbient(ambient, startHour, scenario.climate);
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

	/** Fills the grid points of a step from the one up to, but not at, the other. */
	takeStep(step: Step, standing: Standing, minute: number, last: number): void {
		if (minute === last) return;
		const { columns } = this;
		for (let node = 0; node < columns.length; node++) {
			fillMinutes(step, node, minute, last, columns[node]!);
		}
		this.fillStanding(standing, minute, last);
	}

	/** Fills what is left once the last leg has ended: at most its last instant. */
	takeEnd(temps: Float64Array, standing: Standing, minute: number): void {
		const { columns, minutes } = this;
		if (minute === minutes.count) return;
		for (let node = 0; node < columns.length; node++) {
			columns[node]!.fill(temps[node]!, minute, minutes.count);
		}
		this.fillStanding(standing, minute, minutes.count);
	}

	/** The highest temperature of each node on the grid. */
	findPeaks(): NodeValues {
		const { nodes } = this.minutes;
		return this.readRow((name) => findHighest(nodes[name]));
	}

	/** The start and every whole hour after it. */
	readHours(): HourlyRow[] {
		const { soc, count, startHour } = this.minutes;
		const rows: HourlyRow[] = [];
		for (let minute = 0; minute < count; minute += MINUTES_PER_H) {
			rows.push({
				hour: startHour + minute / MINUTES_PER_H,
				...this.readMinute(minute),
				soc: soc[minute]!
			});
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

	private readMinute(minute: number): NodeValues {
		const { nodes } = this.minutes;
		return this.readRow((name) => nodes[name][minute]!);
	}

	private fillStanding({ span, spanStartS, bms }: Standing, minute: number, last: number): void {
		const { soc, currentA, chargeOpen, dischargeOpen } = this.minutes;
		fillCharge(span, spanStartS, soc, currentA, minute, last);
		if (bms.isOpen('charge')) chargeOpen.fill(1, minute, last);
		if (bms.isOpen('discharge')) dischargeOpen.fill(1, minute, last);
	}
}
