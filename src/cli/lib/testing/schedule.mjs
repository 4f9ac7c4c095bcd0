/**
 * @template T
 * @typedef {{ name: string, needs?: string, alone?: boolean, work: () => Promise<T> }} Phase
 */

/**
 * Runs phases in their order, two at a time where that is allowed. A phase that needs another waits for it.
 * @template T
 * @param {Phase<T>[]} phases
 * @param {(phase: Phase<T>, begun: number) => Promise<T>} runOne
 * @param {number} [atOnce]
 * @returns {Promise<T[]>} in the order of the phases
 */
export async function runPhases(phases, runOne, atOnce = 2) {
	/** @type {Map<string, Promise<T>>} */
	const begun = new Map();
	/** @type {Set<Promise<unknown>>} */
	const running = new Set();
	for (const phase of phases) {
		const inTheWay = phase.alone ? 0 : atOnce - 1;
		while (running.size > inTheWay) await Promise.race(running);
		if (phase.needs) await begun.get(phase.needs);
		const result = runOne(phase, performance.now());
		begun.set(phase.name, result);
		const tracked = result.finally(() => running.delete(tracked));
		running.add(tracked);
		if (phase.alone) await tracked;
	}
	return Promise.all(begun.values());
}
