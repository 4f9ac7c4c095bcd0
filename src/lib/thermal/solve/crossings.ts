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

const HALVINGS = 52;

/** All places in 0…1 where the cubic passes through the level. */
export function findRoots(cubic: Cubic, level: number): number[] {
	const ends = [0, ...findTurns(cubic), 1];
	const roots: number[] = [];
	for (let k = 1; k < ends.length; k++) {
		let low = ends[k - 1]!;
		let high = ends[k]!;
		const below = valueAt(cubic, low) < level;
		if (valueAt(cubic, high) < level === below) continue;
		for (let halving = 0; halving < HALVINGS; halving++) {
			const middle = (low + high) / 2;
			if (valueAt(cubic, middle) < level === below) low = middle;
			else high = middle;
		}
		roots.push(high);
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
