import type { Step } from './stepper';

/** a0 + a1 s + a2 s² + a3 s³: the temperature of one node inside a step. */
export type Cubic = readonly [number, number, number, number];

export function readCubic(step: Step, node: number): Cubic {
	const from = step.from[node]!;
	const inner2 = step.inner2[node]!;
	const inner3 = step.inner3[node]!;
	return [from, step.to[node]! - from + inner2, inner3 - inner2, -inner3];
}

function valueAt([a0, a1, a2, a3]: Cubic, s: number): number {
	return a0 + s * (a1 + s * (a2 + s * a3));
}

/** Where the slope of the cubic is zero inside 0…1, in order. */
function findTurns([, a1, a2, a3]: Cubic): number[] {
	const quadratic = 3 * a3;
	const half = a2;
	const roots: number[] = [];
	const discriminant = half * half - quadratic * a1;
	if (discriminant > 0) {
		// Written so that nothing cancels when the cubic term is small.
		const sum = -(half + Math.sign(half || 1) * Math.sqrt(discriminant));
		if (sum !== 0) roots.push(a1 / sum);
		if (quadratic !== 0) roots.push(sum / quadratic);
	}
	return roots.filter((s) => s > 0 && s < 1).sort((a, b) => a - b);
}

const MOST_NEWTON = 60;
/** Places nearer than this share of a step are one: a value is not known to less than the rounding of its terms. */
const SAME_PLACE = 1e-12;

/** The one place between two where the cubic passes through the level: Newton's rule, halving where it would leave them. */
function findRootBetween(cubic: Cubic, level: number, from: number, to: number): number {
	const [, a1, a2, a3] = cubic;
	const below = valueAt(cubic, from) < level;
	let low = from;
	let high = to;
	let at = (from + to) / 2;
	for (let k = 0; k < MOST_NEWTON && high - low > SAME_PLACE; k++) {
		const above = valueAt(cubic, at) - level;
		if (above === 0) return at;
		if (above < 0 === below) low = at;
		else high = at;
		const next = at - above / (a1 + at * (2 * a2 + at * 3 * a3));
		const inside = next > low && next < high;
		if (inside && Math.abs(next - at) < SAME_PLACE) return next;
		at = inside ? next : (low + high) / 2;
	}
	return high;
}

/** All places in 0…1 where the cubic passes through the level. */
export function findRoots(cubic: Cubic, level: number): number[] {
	const ends = [0, ...findTurns(cubic), 1];
	const roots: number[] = [];
	for (let k = 1; k < ends.length; k++) {
		const start = ends[k - 1]!;
		const end = ends[k]!;
		const below = valueAt(cubic, start) < level;
		if (valueAt(cubic, end) < level !== below) roots.push(findRootBetween(cubic, level, start, end));
	}
	return roots;
}

function innerBound(step: Step, node: number): number {
	return (Math.abs(step.inner2[node]!) + Math.abs(step.inner3[node]!)) / 4;
}

/** No value of the node inside the step is higher. */
export function highestBound(step: Step, node: number): number {
	return Math.max(step.from[node]!, step.to[node]!) + innerBound(step, node);
}

/** No value of the node inside the step is lower. */
function lowestBound(step: Step, node: number): number {
	return Math.min(step.from[node]!, step.to[node]!) - innerBound(step, node);
}

/** Whether the hottest of some nodes can be at the level or above anywhere in the step: most steps come nowhere near. */
export function mayReach(step: Step, nodes: readonly number[], level: number): boolean {
	for (let k = 0; k < nodes.length; k++) if (highestBound(step, nodes[k]!) >= level) return true;
	return false;
}

/** Whether the hottest of some nodes can be at the level or below anywhere in the step. */
export function mayFall(step: Step, nodes: readonly number[], level: number): boolean {
	for (let k = 0; k < nodes.length; k++) if (lowestBound(step, nodes[k]!) > level) return false;
	return true;
}

/** What is looked for: at or above the level, at or below it, or truly below it. */
export type Crossing = 'reach' | 'fall' | 'leave';

const HOLDS: Record<Crossing, (value: number, level: number) => boolean> = {
	reach: (value, level) => value >= level,
	fall: (value, level) => value <= level,
	leave: (value, level) => value < level
};

/** After a stop at a level the next step begins a rounding error beside it: that is not a crossing. */
const ROUNDING_S = 1e-3;

/** The first place in a step where the hottest of some nodes comes to hold the crossing; null when it does not. */
export function findCrossing(
	step: Step,
	nodes: readonly number[],
	level: number,
	crossing: Crossing
): number | null {
	const near = crossing === 'reach' ? mayReach(step, nodes, level) : mayFall(step, nodes, level);
	if (!near) return null;
	const holds = HOLDS[crossing];
	const cubics = nodes.map((node) => readCubic(step, node));
	const hottestAt = (share: number) => Math.max(...cubics.map((cubic) => valueAt(cubic, share)));
	const places = [0, ...cubics.flatMap((cubic) => findRoots(cubic, level)).sort((a, b) => a - b), 1];
	for (let k = 1; k < places.length; k++) {
		const start = places[k - 1]!;
		const end = places[k]!;
		if (start === 0 && end < 1 && end * step.lengthS < ROUNDING_S) continue;
		if (holds(hottestAt((start + end) / 2), level)) return start;
	}
	return crossing !== 'leave' && holds(hottestAt(1), level) ? 1 : null;
}
