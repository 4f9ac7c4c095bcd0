import { readStep, type Step } from '../solve/rosenbrock';
import {
	NODE_NAMES,
	type HourlyRow,
	type MinuteSeries,
	type NodeName,
	type NodeValues,
	type Scenario
} from '../types';
import type { Bms } from './bms';
import { readCurrentA, readSoc, type ChargeSpan } from './charge';
import { ambientTempC } from './climate';

const MINUTE_S = 60;
const MINUTES_PER_H = 60;
/** Sums of leg lengths carry rounding errors; a grid point this near the end still counts, min. */
const ROUNDING_MIN = 1e-7;

function findHighest(temps: Float64Array): number {
	let high = -Infinity;
	for (let minute = 0; minute < temps.length; minute++) high = Math.max(high, temps[minute]!);
	return high;
}

/** The current that flows and the latches as they stand while steps are taken. */
export interface Standing {
	span: ChargeSpan;
	spanStartS: number;
	bms: Bms;
}

/** Fills the grid of minutes from the steps as they are taken. */
export class MinuteRecord {
	readonly minutes: MinuteSeries;
	private next = 0;
	/** One column a solved node, in the order of the solver. */
	private readonly columns: readonly Float64Array[];

	constructor(
		private readonly scenario: Scenario,
		storedNames: readonly string[],
		totalMinutes: number
	) {
		const count = Math.floor(totalMinutes + ROUNDING_MIN) + 1;
		const startHour = scenario.start.hour;
		const column = () => new Float64Array(count);
		const nodes = Object.fromEntries(NODE_NAMES.map((name) => [name, column()])) as Record<
			NodeName,
			Float64Array
		>;
		this.columns = storedNames.map((name) => nodes[name as NodeName]);
		const ambient = column();
		for (let minute = 0; minute < count; minute++) {
			ambient[minute] = ambientTempC(startHour + minute / MINUTES_PER_H, scenario.climate);
		}
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

	/** Fills the grid points from the start of the step up to, but not at, its end. */
	fillStep(step: Step, standing: Standing): void {
		const endS = step.timeS + step.lengthS;
		const { minutes, columns } = this;
		for (; this.next < minutes.count && this.next * MINUTE_S < endS; this.next++) {
			const minute = this.next;
			const share = (minute * MINUTE_S - step.timeS) / step.lengthS;
			for (let node = 0; node < columns.length; node++) {
				columns[node]![minute] = readStep(step, node, share);
			}
			this.fillStanding(minute, standing);
		}
	}

	/** Fills what is left once the last leg has ended: at most its last instant. */
	fillEnd(temps: Float64Array, standing: Standing): void {
		const { minutes, columns } = this;
		for (; this.next < minutes.count; this.next++) {
			for (let node = 0; node < columns.length; node++) {
				columns[node]![this.next] = temps[node]!;
			}
			this.fillStanding(this.next, standing);
		}
	}

	/** The highest temperature of each node on the grid, and where the cells have theirs. */
	findPeaks(): { peaks: NodeValues; peakMinute: number } {
		const { nodes, count } = this.minutes;
		const peaks = this.readRow((name) => findHighest(nodes[name]));
		let peakMinute = 0;
		for (let minute = 1; minute < count; minute++) {
			if (nodes.cells[minute]! > nodes.cells[peakMinute]!) peakMinute = minute;
		}
		return { peaks, peakMinute };
	}

	/** The start and every whole hour after it. */
	readHours(): HourlyRow[] {
		const { nodes, soc, count, startHour } = this.minutes;
		const rows: HourlyRow[] = [];
		for (let minute = 0; minute < count; minute += MINUTES_PER_H) {
			const hour = startHour + minute / MINUTES_PER_H;
			rows.push({ hour, ...this.readRow((name) => nodes[name][minute]!), soc: soc[minute]! });
		}
		return rows;
	}

	/** One value a node; null for a shield that is not there. */
	readRow(read: (name: NodeName) => number): NodeValues {
		return Object.fromEntries(
			NODE_NAMES.map((name) => [name, name === 'shield' && !this.scenario.shield ? null : read(name)])
		) as NodeValues;
	}

	private fillStanding(minute: number, { span, spanStartS, bms }: Standing): void {
		const afterS = minute * MINUTE_S - spanStartS;
		this.minutes.soc[minute] = readSoc(span, afterS);
		this.minutes.currentA[minute] = readCurrentA(span, afterS);
		this.minutes.chargeOpen[minute] = Number(bms.isOpen('charge'));
		this.minutes.dischargeOpen[minute] = Number(bms.isOpen('discharge'));
	}
}
