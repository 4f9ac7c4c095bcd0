/** How long a slice of work may hold the thread before others get their turn, ms. */
const SLICE_MS = 12;

/** Lets everything else that waits go first. */
function giveWay(): Promise<void> {
	return new Promise((resolve) => setImmediate(resolve));
}

/** For work that comes piece by piece: asked after each, it lets others go first whenever its slice is over. */
export function makePace(): () => Promise<void> {
	let until = performance.now() + SLICE_MS;
	return async () => {
		if (performance.now() < until) return;
		await giveWay();
		until = performance.now() + SLICE_MS;
	};
}

/**
 * Drives long work to its end in slices, so that requests are answered between them.
 *
 * @param work yields after each small piece how far it is
 * @param tell hears of it once a slice
 */
export async function workInSlices<Progress, Result>(
	work: Generator<Progress, Result>,
	tell: (progress: Progress) => void = () => {}
): Promise<Result> {
	let until = performance.now() + SLICE_MS;
	for (;;) {
		const step = work.next();
		if (step.done) return step.value;
		if (performance.now() < until) continue;
		tell(step.value);
		await giveWay();
		until = performance.now() + SLICE_MS;
	}
}

let last: Promise<unknown> = Promise.resolve();

/** One long work after the other, in the order in which they were asked for. */
export function afterOthers<Result>(work: () => Promise<Result>): Promise<Result> {
	const mine = last.then(work);
	last = mine.catch(() => undefined);
	return mine;
}
