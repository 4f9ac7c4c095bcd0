/**
 * Drives work that yields how far it is to its end at once.
 *
 * @param work a generator
 * @returns what it returns
 * @throws what it throws
 * Validity: work that ends.
 * Source: our own.
 * @example
 * const work = spreadPeak(defaultScenario([{ minutes: 60 }]), 'case', { samples: 4, seed: 1 });
 * finishWork(work).samples; // 4
 */
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
