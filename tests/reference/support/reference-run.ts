import type { ModelLeg, ModelScenario } from './defaults';
import type { Piece, ReferenceIntegrator } from './integrator';
import { MODEL_STATE, modelAmbientC, modelDerivative, type ModelSwitches } from './model-equations';

export interface ReferenceEvent {
	side: 'charge' | 'discharge';
	kind: 'cut' | 'reset';
	hour: number;
}

export interface ReferenceRun {
	/** One state a minute from the start, in the order of MODEL_STATE. */
	minutes: number[][];
	end: number[];
	events: ReferenceEvent[];
	evaluations: number;
}

interface ModelLatch {
	side: 'charge' | 'discharge';
	open: boolean;
	/** Since when the sensor has stood at the cut, s; null while it does not. */
	hotSinceS: number | null;
}

const CELLS = MODEL_STATE.indexOf('cells');
const BOARD = MODEL_STATE.indexOf('board');
const SOC = MODEL_STATE.indexOf('soc');
const PROBES = 4;
const BISECTIONS = 40;

function readSensor(s: ModelScenario, y: readonly number[]): number {
	if (s.bms.sensor === 'cells') return y[CELLS]!;
	if (s.bms.sensor === 'board') return y[BOARD]!;
	return Math.max(y[CELLS]!, y[BOARD]!);
}

/** A thing to look out for, with what follows from it. */
interface Alarm {
	rings: (y: readonly number[]) => boolean;
	act: (timeS: number, y: number[]) => void;
}

/** Section 6, driven by a library's integrator: every alarm stops it, is located by halving, and restarts it. */
export class ReferenceRunner {
	private readonly minutes: number[][] = [];
	private readonly events: ReferenceEvent[] = [];
	private readonly latches: ModelLatch[] = [
		{ side: 'charge', open: false, hotSinceS: null },
		{ side: 'discharge', open: false, hotSinceS: null }
	];
	private empty: boolean;
	private evaluations = 0;

	constructor(
		private readonly s: ModelScenario,
		private readonly integrate: ReferenceIntegrator
	) {
		this.empty = s.start.soc <= 0;
	}

	run(): ReferenceRun {
		const { s } = this;
		let y: number[] = MODEL_STATE.map(() => modelAmbientC(s.start.hour, s.climate));
		y[SOC] = s.start.soc;
		this.minutes.push([...y]);
		for (const alarm of this.findLatchAlarms()) if (alarm.rings(y)) alarm.act(0, y);
		let legStartS = 0;
		for (const leg of s.legs) {
			const legEndS = legStartS + leg.minutes * 60;
			y = this.runLeg(leg, legStartS, legEndS, y);
			legStartS = legEndS;
		}
		return { minutes: this.minutes, end: y, events: this.events, evaluations: this.evaluations };
	}

	private runLeg(leg: ModelLeg, startS: number, endS: number, start: number[]): number[] {
		let now = startS;
		let y = start;
		while (endS - now > 1e-7) {
			const hours = this.s.start.hour + now / 3600;
			const nextHourS = (Math.floor(hours + 1e-9) + 1 - this.s.start.hour) * 3600;
			const deadlines = this.latches.map((latch) => this.findDeadline(latch));
			const until = Math.min(endS, nextHourS, ...deadlines);
			if (until - now > 1e-7) {
				const stop = this.runSpan(leg, now, until, y);
				now = stop.timeS;
				y = stop.y;
			} else {
				now = until;
			}
			for (const latch of this.latches) {
				if (this.findDeadline(latch) <= now + 1e-7) this.open(latch, now);
			}
		}
		return y;
	}

	/** Runs until the end or the first alarm. */
	private runSpan(
		leg: ModelLeg,
		fromS: number,
		toS: number,
		start: number[]
	): { timeS: number; y: number[] } {
		const switches = this.readSwitches();
		const alarms = [...this.findLatchAlarms(), ...this.findChargeAlarms(leg, start)];
		let end = { timeS: toS, y: start };
		let acts: Alarm[] = [];
		const derivative = (timeS: number, y: readonly number[]) => {
			this.evaluations++;
			return modelDerivative(this.s, leg, switches, this.s.start.hour + timeS / 3600, y);
		};
		this.integrate(derivative, fromS, start, toS, (piece) => {
			const ringing = this.findFirstAlarm(piece, alarms);
			const stopS = ringing?.timeS ?? piece.toS;
			this.fillMinutes(piece, stopS);
			end = { timeS: stopS, y: piece.read(stopS) };
			acts = ringing?.alarms ?? [];
			return ringing ? 'stop' : 'go on';
		});
		for (const alarm of acts) alarm.act(end.timeS, end.y);
		return end;
	}

	private findFirstAlarm(piece: Piece, alarms: readonly Alarm[]): { timeS: number; alarms: Alarm[] } | null {
		let low = piece.fromS;
		for (let probe = 1; probe <= PROBES; probe++) {
			let high = piece.fromS + ((piece.toS - piece.fromS) * probe) / PROBES;
			if (probe === PROBES) high = piece.toS;
			const anyRings = (timeS: number) => alarms.some((alarm) => alarm.rings(piece.read(timeS)));
			if (anyRings(high)) {
				for (let k = 0; k < BISECTIONS; k++) {
					const middle = (low + high) / 2;
					if (anyRings(middle)) high = middle;
					else low = middle;
				}
				const y = piece.read(high);
				return { timeS: high, alarms: alarms.filter((alarm) => alarm.rings(y)) };
			}
			low = high;
		}
		return null;
	}

	private fillMinutes(piece: Piece, upToS: number): void {
		while (this.minutes.length * 60 <= upToS + 1e-7) {
			this.minutes.push(piece.read(Math.min(this.minutes.length * 60, upToS)));
		}
	}

	private readSwitches(): ModelSwitches {
		return { chargeOpen: this.latches[0]!.open, dischargeOpen: this.latches[1]!.open, empty: this.empty };
	}

	private findDeadline({ open, hotSinceS }: ModelLatch): number {
		return open || hotSinceS === null ? Infinity : hotSinceS + this.s.bms.cutDelayS;
	}

	private open(latch: ModelLatch, timeS: number): void {
		latch.open = true;
		latch.hotSinceS = null;
		this.events.push({ side: latch.side, kind: 'cut', hour: this.s.start.hour + timeS / 3600 });
	}

	private findLatchAlarms(): Alarm[] {
		const { s } = this;
		return this.latches.map((latch): Alarm => {
			const { cut, reset } = s.bms[latch.side];
			if (latch.open) {
				return {
					rings: (y) => s.bms.autoReset && readSensor(s, y) <= reset,
					act: (timeS) => {
						latch.open = false;
						this.events.push({ side: latch.side, kind: 'reset', hour: s.start.hour + timeS / 3600 });
					}
				};
			}
			if (latch.hotSinceS !== null) {
				return {
					rings: (y) => readSensor(s, y) < cut - 1e-9,
					act: () => (latch.hotSinceS = null)
				};
			}
			return {
				rings: (y) => readSensor(s, y) >= cut,
				act: (timeS) => {
					if (s.bms.cutDelayS > 0) latch.hotSinceS = timeS;
					else this.open(latch, timeS);
				}
			};
		});
	}

	/** The battery runs empty, leaves empty, or begins to taper: the current bends or jumps there. */
	private findChargeAlarms(leg: ModelLeg, start: readonly number[]): Alarm[] {
		const { maxA, taperSoc } = this.s.charger;
		const spare = (leg.engineOn ? maxA : 0) - leg.loadA;
		const onset = maxA > 0 ? 1 - ((1 - taperSoc) * spare) / maxA : 1;
		const alarms: Alarm[] = [];
		if (!this.empty && spare < 0) {
			const act = (_timeS: number, y: number[]) => {
				this.empty = true;
				y[SOC] = 0;
			};
			alarms.push({ rings: (y) => y[SOC]! <= 0, act });
		}
		if (this.empty && spare > 0) {
			alarms.push({ rings: (y) => y[SOC]! > 0, act: () => (this.empty = false) });
		}
		if (spare > 0 && start[SOC]! < onset) alarms.push({ rings: (y) => y[SOC]! >= onset, act: () => {} });
		return alarms;
	}
}

/** Runs a scenario with a library's integrator. */
export function runReference(scenario: ModelScenario, integrate: ReferenceIntegrator): ReferenceRun {
	return new ReferenceRunner(scenario, integrate).run();
}
