import type { Step } from '../solve/stepper';

const MINUTE_S = 60;

/**
 * Writes one node's temperatures on the whole minutes of a step, by the forward differences of its cubic.
 *
 * @param minute the first whole minute in the step
 * @param last one beyond the last
 * @param column where they go, one value a minute; null when only the highest is asked for
 * @param highest the highest so far
 * @param offset place of the first of them in the column, when it is not the minute itself
 * @returns the highest now
 */
export function fillMinutes(
	step: Step,
	node: number,
	minute: number,
	last: number,
	column: Float64Array | null,
	highest: number,
	offset = minute
): number {
	const share = (minute * MINUTE_S - step.timeS) / step.lengthS;
	const apart = MINUTE_S / step.lengthS;
	const from = step.from[node]!;
	const inner2 = step.inner2[node]!;
	const inner3 = step.inner3[node]!;
	const a1 = step.to[node]! - from + inner2;
	const a2 = inner3 - inner2;
	let value = from + share * (a1 + share * (a2 - share * inner3));
	let first =
		apart * (a1 + a2 * (2 * share + apart) - inner3 * (3 * share * (share + apart) + apart * apart));
	let second = 2 * apart * apart * (a2 - 3 * inner3 * (share + apart));
	const third = -6 * inner3 * apart * apart * apart;
	let high = highest;
	for (let at = minute; at < last; at++) {
		if (column !== null) column[offset + at - minute] = value;
		if (value > high) high = value;
		value += first;
		first += second;
		second += third;
	}
	return high;
}
