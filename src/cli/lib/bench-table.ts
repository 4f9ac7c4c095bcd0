interface Run {
	minutes: readonly (readonly number[])[];
	events: readonly { hour: number }[];
	evaluations: number;
}

export interface Deviation {
	evaluations: number;
	largestK: number;
	/** Null when the events are not the same ones. */
	largestEventS: number | null;
}

/** Runs are repeated up to this in one measurement: what is measured is the steady state, not the way there. */
const SHORTEST_MS = 250;
/** Before the first measurement of all: the compiler of the engine takes its time to settle. */
const WARM_UP_MS = 3000;

function timeOnce(action: () => unknown, repeats: number): number {
	const start = performance.now();
	for (let k = 0; k < repeats; k++) action();
	return (performance.now() - start) / repeats;
}

/** Repeats an action until nothing about it changes any more. */
export function warmUp(action: () => unknown): void {
	const end = performance.now() + WARM_UP_MS;
	while (performance.now() < end) action();
}

/** Milliseconds of one action among many of the same, ms. */
export function timeSteadily(action: () => unknown): number {
	return timeOnce(action, Math.max(1, Math.ceil(SHORTEST_MS / timeOnce(action, 3))));
}

export function findMedian(values: readonly number[]): number {
	const sorted = [...values].sort((a, b) => a - b);
	const middle = sorted.length >> 1;
	return sorted.length % 2 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}

/** How far a run is from a much tighter one. */
export function compareRuns(run: Run, truth: Run): Deviation {
	let largestK = 0;
	truth.minutes.forEach((state, minute) =>
		state.forEach((value, k) => {
			largestK = Math.max(largestK, Math.abs(run.minutes[minute]![k]! - value));
		})
	);
	const sameEvents = run.events.length === truth.events.length;
	const delaysS = truth.events.map(({ hour }, k) => Math.abs((run.events[k]?.hour ?? NaN) - hour) * 3600);
	return {
		evaluations: run.evaluations,
		largestK,
		largestEventS: sameEvents ? Math.max(0, ...delaysS) : null
	};
}

/** Rows of cells under a row of heads: the first column to the left, numbers to the right. */
export function formatTable(cells: readonly (readonly string[])[]): string {
	const widths = cells[0]!.map((_, k) => Math.max(...cells.map((row) => row[k]!.length)));
	return cells
		.map((row) =>
			row.map((cell, k) => (k === 0 ? cell.padEnd(widths[k]!) : cell.padStart(widths[k]!))).join('  ')
		)
		.join('\n');
}

export const formatSeconds = (ms: number): string => `${(ms / 1000).toFixed(1)} s`;
