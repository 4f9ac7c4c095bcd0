/** Drives work that yields how far it is to its end at once. */
export function finishWork<T>(work: Generator<unknown, T>): T {
	for (;;) {
		const step = work.next();
		if (step.done) return step.value;
	}
}

/** Does a work as a part of a larger one: what it yields is said in the larger one's terms. */
export function* partOf<P, Q, T>(work: Generator<P, T>, say: (progress: P) => Q): Generator<Q, T> {
	for (;;) {
		const step = work.next();
		if (step.done) return step.value;
		yield say(step.value);
	}
}
