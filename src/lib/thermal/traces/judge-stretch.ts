import type { TraceChannel } from './channels';
import type { Evidence } from './leg-evidence';
import type { LegState } from './trace-legs';

export interface Judgement {
	kind: LegState;
	why: string;
}

/** A mean of this and more is driving, km/h; engineering judgement: a parked receiver drifts at 1 to 2. */
const MOVING_KMH = 5;
/** The alternator charges with this and more, and no load does, A; engineering judgement. */
const CHARGING_A = 1;
/** Share of a temperature's own range above which it is hot, and its change in a stretch that is one; engineering judgement. */
const HOT_SHARE = 0.5;
const CHANGE_SHARE = 0.1;

type Judge = (values: Float64Array, from: number, to: number) => Judgement | null;

const meanOf = (values: Float64Array): number =>
	values.reduce((sum, value) => sum + value, 0) / values.length;
const show = (value: number): string => String(Math.round(value));

const judgeSpeed: Judge = (values, from, to) => {
	const speedKmh = meanOf(values.subarray(from, to));
	return { kind: speedKmh >= MOVING_KMH ? 'driving' : 'stopped', why: `speed ${show(speedKmh)} km/h` };
};

/** A full battery takes no charge while driving: no charge alone says nothing. */
const judgeCurrent: Judge = (values, from, to) => {
	const currentA = meanOf(values.subarray(from, to));
	return currentA >= CHARGING_A ? { kind: 'driving', why: `charging with ${show(currentA)} A` } : null;
};

function judgeHeat(name: string): Judge {
	return (values, from, to) => {
		const low = values.reduce((a, b) => Math.min(a, b), Infinity);
		const range = values.reduce((a, b) => Math.max(a, b), -Infinity) - low;
		const part = values.subarray(from, to);
		const riseK = part.at(-1)! - part[0]!;
		if (riseK > CHANGE_SHARE * range) return { kind: 'driving', why: `${name} warms by ${show(riseK)} K` };
		if (riseK < -CHANGE_SHARE * range) return { kind: 'stopped', why: `${name} cools by ${show(-riseK)} K` };
		const isHot = meanOf(part) > low + HOT_SHARE * range;
		return { kind: isHot ? 'driving' : 'stopped', why: `${name} stays ${isHot ? 'hot' : 'cool'}` };
	};
}

const JUDGES: Partial<Record<TraceChannel, Judge>> = {
	speedKmh: judgeSpeed,
	currentA: judgeCurrent,
	exhaustShieldC: judgeHeat('exhaust shield'),
	bayAirC: judgeHeat('bay air')
};

/** What the vehicle did in a stretch, by the first channel that can tell. */
export function judgeStretch(evidence: readonly Evidence[], from: number, to: number): Judgement {
	for (const { channel, values } of evidence) {
		const judgement = JUDGES[channel]?.(values, from, to) ?? null;
		if (judgement !== null) return judgement;
	}
	const why =
		evidence.length === 0 ? 'nothing in the trace tells of driving' : 'no charge, and no temperature tells';
	return { kind: 'stopped', why };
}
