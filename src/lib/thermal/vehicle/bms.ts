import { findCrossing, mayFall, mayReach, type Crossing } from '../solve/crossings';
import type { Step } from '../solve/stepper';
import type { BmsEvent, BmsSettings, LimitPair } from '../types';

type Side = BmsEvent['side'];

/** One latch: closed and watching for its cut, closed with the delay running, or open. */
export interface Latch {
	readonly side: Side;
	readonly limits: LimitPair;
	state: 'closed' | 'waiting' | 'open';
	/** When the running delay ends, s. */
	opensAtS: number;
}

/** What a latch does next: open, close, or start or break off the delay (which nobody is told of). */
export type LatchChange = 'open' | 'close' | 'wait' | 'break';

export interface PlannedChange {
	latch: Latch;
	change: LatchChange;
}

/** Places in a step that lie closer together than this share of it count as one. */
const SAME_PLACE = 1e-9;

/** The two independent latches of a BMS and the nodes that its sensor feels. */
export class Bms {
	readonly latches: readonly Latch[];
	readonly events: BmsEvent[] = [];

	constructor(
		private readonly settings: BmsSettings,
		private readonly sensorNodes: readonly number[]
	) {
		this.latches = (['charge', 'discharge'] as const).map((side) => ({
			side,
			limits: settings[side],
			state: 'closed',
			opensAtS: Infinity
		}));
	}

	isOpen(side: Side): boolean {
		return this.latches[side === 'charge' ? 0 : 1]!.state === 'open';
	}

	/** When a running delay ends at the latest, s. */
	nextDeadlineS(): number {
		let next = Infinity;
		for (const { state, opensAtS } of this.latches) {
			if (state === 'waiting' && opensAtS < next) next = opensAtS;
		}
		return next;
	}

	/** At the start, and when a delay has run out: what the temperatures alone decide. Tells whether a latch moved. */
	settle(timeS: number, hour: number, temps: Float64Array): boolean {
		let sensor = -Infinity;
		for (const node of this.sensorNodes) sensor = Math.max(sensor, temps[node]!);
		let moved = false;
		for (const latch of this.latches) {
			if (latch.state === 'closed' && timeS === 0 && sensor >= latch.limits.cut) {
				moved = this.apply(latch, this.reachedCut(), timeS, hour) || moved;
			}
			if (latch.state === 'waiting' && latch.opensAtS <= timeS) {
				moved = this.apply(latch, 'open', timeS, hour) || moved;
			}
		}
		return moved;
	}

	/** The first place in the step where a latch changes, with all that change there; null when none does. */
	findChange(step: Step): { share: number; changes: PlannedChange[] } | null {
		if (!this.mayChange(step, this.latches[0]!) && !this.mayChange(step, this.latches[1]!)) return null;
		const found = this.latches.flatMap((latch) => this.watch(step, latch));
		if (found.length === 0) return null;
		const share = Math.min(...found.map((change) => change.share));
		return { share, changes: found.filter((change) => change.share <= share + SAME_PLACE) };
	}

	/** Carries out a change; tells whether a latch moved. */
	apply(latch: Latch, change: LatchChange, timeS: number, hour: number): boolean {
		if (change === 'wait') {
			latch.state = 'waiting';
			latch.opensAtS = timeS + this.settings.cutDelayS;
			return false;
		}
		if (change === 'break') {
			latch.state = 'closed';
			return false;
		}
		latch.state = change === 'open' ? 'open' : 'closed';
		this.events.push({ side: latch.side, kind: change === 'open' ? 'cut' : 'reset', hour });
		return true;
	}

	private reachedCut(): 'wait' | 'open' {
		return this.settings.cutDelayS > 0 ? 'wait' : 'open';
	}

	/** The level that a latch watches for and how; null when nothing moves it any more. */
	private watchedBy({ state, limits }: Latch): { level: number; crossing: Crossing } | null {
		if (state === 'closed') return { level: limits.cut, crossing: 'reach' };
		if (state === 'waiting') return { level: limits.cut, crossing: 'leave' };
		return this.settings.autoReset ? { level: limits.reset, crossing: 'fall' } : null;
	}

	private mayChange(step: Step, { state, limits }: Latch): boolean {
		if (state === 'open') return this.settings.autoReset && mayFall(step, this.sensorNodes, limits.reset);
		return state === 'waiting' || mayReach(step, this.sensorNodes, limits.cut);
	}

	private watch(step: Step, latch: Latch): (PlannedChange & { share: number })[] {
		const watched = this.watchedBy(latch);
		if (watched === null) return [];
		const share = findCrossing(step, this.sensorNodes, watched.level, watched.crossing);
		if (share === null) return [];
		const change = { reach: this.reachedCut(), leave: 'break', fall: 'close' } as const;
		return [{ latch, change: change[watched.crossing], share }];
	}
}
