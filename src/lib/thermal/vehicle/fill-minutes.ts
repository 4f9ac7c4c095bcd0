import { highestBound } from '../solve/crossings';
import type { Step } from '../solve/stepper';

const MINUTE_S = 60;

/** Values, first, second and third differences of a node's cubic on the grid of minutes. */
const differences = new Float64Array(4);

/** Works out the differences from the first whole minute in a step on. */
function beginAt(step: Step, node: number, minute: number): void {
	const share = (minute * MINUTE_S - step.timeS) / step.lengthS;
	const apart = MINUTE_S / step.lengthS;
	const from = step.from[node]!;
	const inner2 = step.inner2[node]!;
	const inner3 = step.inner3[node]!;
	const a1 = step.to[node]! - from + inner2;
	const a2 = inner3 - inner2;
	differences[0] = from + share * (a1 + share * (a2 - share * inner3));
	differences[1] =
		apart * (a1 + a2 * (2 * share + apart) - inner3 * (3 * share * (share + apart) + apart * apart));
	differences[2] = 2 * apart * apart * (a2 - 3 * inner3 * (share + apart));
	differences[3] = -6 * inner3 * apart * apart * apart;
}

/**
 * Writes one node's temperatures on the whole minutes of a step, by the forward differences of its cubic.
 *
 * @param minute the first whole minute in the step
 * @param last one beyond the last
 * @param column where they go, one value a minute
 */
export function fillMinutes(
	step: Step,
	node: number,
	minute: number,
	last: number,
	column: Float64Array
): void {
	beginAt(step, node, minute);
	let value = differences[0]!;
	let first = differences[1]!;
	let second = differences[2]!;
	const third = differences[3]!;
	for (let at = minute; at < last; at++) {
		column[at] = value;
		value += first;
		first += second;
		second += third;
	}
}

/**
 * Raises the highest temperature of a node to the highest on the whole minutes of a step; most steps cannot.
 *
 * @param highestC where the highest stands, at the node's place
 */
export function raiseHighest(
	step: Step,
	node: number,
	minute: number,
	last: number,
	highestC: Float64Array
): void {
	let high = highestC[node]!;
	if (highestBound(step, node) <= high) return;
	beginAt(step, node, minute);
	let value = differences[0]!;
	let first = differences[1]!;
	let second = differences[2]!;
	const third = differences[3]!;
	for (let at = minute; at < last; at++) {
		if (value > high) high = value;
		value += first;
		first += second;
		second += third;
	}
	highestC[node] = high;
}

/** Writes one node's temperatures every so many minutes of a step, where the grid points fall. */
export function fillEvery(
	step: Step,
	node: number,
	minute: number,
	last: number,
	everyMin: number,
	column: Float64Array
): void {
	for (let at = Math.ceil(minute / everyMin) * everyMin; at < last; at += everyMin) {
		beginAt(step, node, at);
		column[at / everyMin] = differences[0]!;
	}
}
