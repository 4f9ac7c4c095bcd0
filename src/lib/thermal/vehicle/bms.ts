import { findCrossing } from '../solve/crossings';
import type { Step } from '../solve/rosenbrock';
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
		return Math.min(
			...this.latches.map(({ state, opensAtS }) => (state === 'waiting' ? opensAtS : Infinity))
		);
	}

	/** At the start, and when a delay has run out: what the temperatures alone decide. Tells whether a latch moved. */
	settle(timeS: number, hour: number, temps: Float64Array): boolean {
		const sensor = Math.max(...this.sensorNodes.map((node) => temps[node]!));
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
		let share = Infinity;
		const found: (PlannedChange & { share: number })[] = [];
		for (const latch of this.latches) {
			const next = this.watch(step, latch);
			if (next === null) continue;
			found.push({ latch, ...next });
			share = Math.min(share, next.share);
		}
		if (found.length === 0) return null;
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

	private reachedCut(): LatchChange {
		return this.settings.cutDelayS > 0 ? 'wait' : 'open';
	}

	private watch(step: Step, latch: Latch): { share: number; change: LatchChange } | null {
		const { cut, reset } = latch.limits;
		if (latch.state === 'open') {
			if (!this.settings.autoReset) return null;
			const share = findCrossing(step, this.sensorNodes, reset, 'fall');
			return share === null ? null : { share, change: 'close' };
		}
		if (latch.state === 'closed') {
			const share = findCrossing(step, this.sensorNodes, cut, 'reach');
			return share === null ? null : { share, change: this.reachedCut() };
		}
		const share = findCrossing(step, this.sensorNodes, cut, 'leave');
		return share === null ? null : { share, change: 'break' };
	}
}
