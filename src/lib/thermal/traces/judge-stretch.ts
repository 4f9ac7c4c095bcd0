import { sampleQuantile } from '../statistics';
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

/** Above the outside air: less than this the sun alone makes, in all and where it stays; engineering judgement. */
const LEAST_EXCESS_K = 8;
const WARM_EXCESS_K = 4;

/** So cool it is for a tenth of a day that was not driven through. */
const REST_QUANTILE = 0.1;

/**
 * What stands between a bay and the outside air while the vehicle rests, K: two sensors are not one, and a wall holds warmth. No
 * more than the sun alone makes, so that a day of nothing but driving is not taken for rest.
 */
const findRest = (values: Float64Array): number =>
	Math.min(Math.max(sampleQuantile([...values], REST_QUANTILE), 0), LEAST_EXCESS_K);

type Judge = (evidence: Evidence, from: number, to: number) => Judgement | null;

const meanOf = (values: Float64Array): number =>
	values.reduce((sum, value) => sum + value, 0) / values.length;
const show = (value: number): string => String(Math.round(value));

const judgeSpeed: Judge = ({ values }, from, to) => {
	const speedKmh = meanOf(values.subarray(from, to));
	return { kind: speedKmh >= MOVING_KMH ? 'driving' : 'stopped', why: `speed ${show(speedKmh)} km/h` };
};

/** A full battery takes no charge while driving: no charge alone says nothing. */
const judgeCurrent: Judge = ({ values }, from, to) => {
	const currentA = meanOf(values.subarray(from, to));
	return currentA >= CHARGING_A ? { kind: 'driving', why: `charging with ${show(currentA)} A` } : null;
};

/** A temperature is a guess: a bay warms once more after a stop, and an engine may run while the vehicle stands. */
function judgeHeat(name: string): Judge {
	return ({ values, isExcess }, from, to) => {
		const low = values.reduce((a, b) => Math.min(a, b), Infinity);
		const range = values.reduce((a, b) => Math.max(a, b), -Infinity) - low;
		if (isExcess && range < LEAST_EXCESS_K) return null;
		const part = values.subarray(from, to);
		const riseK = part.at(-1)! - part[0]!;
		const over = isExcess ? ' over the outside air' : '';
		if (riseK > CHANGE_SHARE * range)
			return { kind: 'driving', why: `a guess: ${name} warms by ${show(riseK)} K${over}` };
		if (riseK < -CHANGE_SHARE * range)
			return { kind: 'stopped', why: `a guess: ${name} cools by ${show(-riseK)} K${over}` };
		const isHot = meanOf(part) > (isExcess ? findRest(values) + WARM_EXCESS_K : low + HOT_SHARE * range);
		return {
			kind: isHot ? 'driving' : 'stopped',
			why: `a guess: ${name} stays ${isHot ? 'hot' : 'cool'}${over}`
		};
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
	for (const each of evidence) {
		const judgement = JUDGES[each.channel]?.(each, from, to) ?? null;
		if (judgement !== null) return judgement;
	}
	const why =
		evidence.length === 0 ? 'nothing in the trace tells of driving' : 'no charge, and no temperature tells';
	return { kind: 'stopped', why };
}
