import { setTimeout as sleep } from 'node:timers/promises';
import { isClosing } from './processes.mjs';
import { Trouble } from './trouble.mjs';

/**
 * @typedef {import('./processes.mjs').Launched} Launched
 * @typedef {{ stop: () => Promise<void>, gaveUp: Promise<never> }} Kept
 */

const MOST_RESTARTS = 5;
const WITHIN_MS = 60_000;
const PAUSE_MS = 300;

/**
 * Whether a program ends so often that starting it again is no use.
 * @param {number[]} endings moments in ms
 * @param {number} now
 */
export function endsTooOften(endings, now) {
	return endings.filter((moment) => now - moment < WITHIN_MS).length > MOST_RESTARTS;
}

/**
 * Starts a program again whenever it ends by itself.
 * @param {{ name: string, first: Launched, start: () => Promise<Launched>, say: (line: string) => void, logFile: string }} what
 * @returns {Kept}
 */
export function keepRunning({ name, first, start, say, logFile }) {
	let current = first;
	let stopping = false;

	/** @returns {Promise<never>} */
	async function watch() {
		/** @type {number[]} */
		const endings = [];
		for (;;) {
			const { code, signal } = await current.ended;
			// The promise of a stopped program's giving up stays open for good.
			if (stopping || isClosing()) return new Promise(() => undefined);
			endings.push(Date.now());
			if (endsTooOften(endings, Date.now())) {
				throw new Trouble(`${name} keeps stopping; its log says why: ${logFile}.`);
			}
			say(`${name} stopped by itself (${signal ?? `code ${code}`}): starting it again.`);
			await sleep(PAUSE_MS);
			if (!stopping) current = await start();
		}
	}

	const gaveUp = watch();
	// Whoever waits for it hears of it; until somebody does, it is no crash.
	gaveUp.catch(() => undefined);
	return {
		gaveUp,
		stop: () => {
			stopping = true;
			return current.stop();
		}
	};
}
