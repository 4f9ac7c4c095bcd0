/** Drives work that yields how far it is to its end at once. */
export function finishWork<T>(work: Generator<unknown, T>): T {
	for (;;) {
		const step = work.next();
		if (step.done) return step.value;
	}
}
