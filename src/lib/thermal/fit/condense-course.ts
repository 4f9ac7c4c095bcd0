import type { MeasuredCourse, Scenario } from '../types';
import { ambientTempC } from '../vehicle/climate';
import { isMeasured, type FitTrace } from './trace';

const S_PER_H = 3600;
/** The model follows what drives it in lines and pieces of this length, s: short against all but the exhaust. */
const PIECE_S = 300;

/** The middle of a few values, which a single wrong one does not move; NaN of none. */
export function middleOf(values: readonly number[]): number {
	const sorted = values.filter((value) => !Number.isNaN(value)).sort((a, b) => a - b);
	const half = sorted.length >> 1;
	if (sorted.length === 0) return NaN;
	return sorted.length % 2 ? sorted[half]! : (sorted[half - 1]! + sorted[half]!) / 2;
}

/** Root of the mean square with the sign of the mean: what heats as the values did. */
function heatingMean(values: readonly number[]): number {
	const known = values.filter((value) => !Number.isNaN(value));
	if (known.length === 0) return NaN;
	const sum = known.reduce((total, value) => total + value, 0);
	const squares = known.reduce((total, value) => total + value * value, 0);
	return Math.sign(sum) * Math.sqrt(squares / known.length);
}

/** The values by the piece that they fall into, pieces beginning at `fromS`. */
function sortIntoPieces(
	timeS: Float64Array,
	values: ArrayLike<number>,
	fromS: number,
	count: number
): number[][] {
	const pieces: number[][] = Array.from({ length: count }, () => []);
	for (let at = 0; at < timeS.length; at++) {
		const piece = Math.floor((timeS[at]! - fromS) / PIECE_S);
		if (piece >= 0 && piece < count) pieces[piece]!.push(values[at]!);
	}
	return pieces;
}

/** Straight lines over what is missing, level before the first and after the last value. */
function bridge(values: readonly number[]): number[] {
	const known = values.flatMap((value, at) => (Number.isNaN(value) ? [] : [at]));
	let next = 0;
	return values.map((value, at) => {
		while (next < known.length && known[next]! < at) next++;
		const after = known[next] ?? known.at(-1)!;
		const before = known[next] === at ? at : (known[next - 1] ?? known[0]!);
		if (after === before) return values[after]!;
		return values[before]! + ((at - before) / (after - before)) * (values[after]! - values[before]!);
	});
}

/** Outside air at the ends of the pieces: where nothing was measured, the day's curve moved to meet what was. */
function condenseAir({ timeS, channels }: FitTrace, { climate, start, legs }: Scenario) {
	const { ambientC } = channels;
	const totalS = 60 * legs.reduce((sum, { minutes }) => sum + minutes, 0);
	const count = Math.ceil(totalS / PIECE_S) + 1;
	const dayC = (atS: number) => ambientTempC(start.hour + atS / S_PER_H, climate);
	const off = isMeasured(ambientC) ? timeS.map((time, at) => ambientC[at]! - dayC(time)) : timeS.map(() => 0);
	const offs = bridge(sortIntoPieces(timeS, off, -PIECE_S / 2, count).map(middleOf));
	return { everyS: PIECE_S, valuesC: Float64Array.from(offs, (value, at) => value + dayC(at * PIECE_S)) };
}

/**
 * What drives the model in a trace: outside air and current, in pieces that it can follow.
 *
 *     air at t = day's curve at t + middle of (measured − day's curve) within 2.5 min;   current = ± √(mean of squares) over 5 min
 *
 * @param trace what was measured
 * @param scenario of the trace, its start at the trace's own
 * @returns the air of the whole day, and the current as far as there are readings
 * Validity: gaps of the air are bridged by the day's curve moved to meet both ends; where no current was read the planned one flows.
 * Source: our own.
 * @example
 * const trace = { startedAtHour: 6, timeS: Float64Array.of(30, 90), channels: { ambientC: Float64Array.of(21, 21) } };
 * condenseCourse(trace, defaultScenario([{ minutes: 5 }])).air.valuesC.length; // 2
 */
export function condenseCourse(
	trace: FitTrace,
	scenario: Scenario
): MeasuredCourse & Required<Pick<MeasuredCourse, 'air'>> {
	const { timeS, channels } = trace;
	const { currentA } = channels;
	const course: ReturnType<typeof condenseCourse> = { air: condenseAir(trace, scenario) };
	if (isMeasured(currentA)) {
		const count = Math.floor(timeS.at(-1)! / PIECE_S) + 1;
		const pieces = sortIntoPieces(timeS, currentA, 0, count).map(heatingMean);
		course.current = { everyS: PIECE_S, valuesA: Float64Array.from(pieces) };
	}
	return course;
}
