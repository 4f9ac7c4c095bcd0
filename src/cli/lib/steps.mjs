/**
 * A time as people say it.
 * @param {number} ms
 */
export function sayTime(ms) {
	const seconds = ms / 1000;
	if (seconds < 60) return `${seconds.toFixed(1)} s`;
	const whole = Math.round(seconds);
	return `${Math.floor(whole / 60)} min ${whole % 60} s`;
}

/** @param {string} words */
function print(words) {
	process.stdout.write(words);
}

/**
 * Does one step and says so on one line: what, what it came to, how long it took.
 * @template T
 * @param {string} label
 * @param {(note: (words: string) => void) => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function step(label, work) {
	const begun = performance.now();
	print(`  ${label.padEnd(14)}`);
	try {
		const result = await work((words) => print(` ${words} …`));
		print(` ${sayTime(performance.now() - begun)}\n`);
		return result;
	} catch (error) {
		print('\n');
		throw error;
	}
}

/**
 * A line for a step that another process has done and timed.
 * @param {string} label
 * @param {string} detail
 * @param {number} ms
 */
export function stepDone(label, detail, ms) {
	print(`  ${label.padEnd(14)} ${detail ? `${detail} … ` : ''}${sayTime(ms)}\n`);
}

/** @param {string} [line] */
export function say(line = '') {
	print(`${line}\n`);
}

/** @param {string} sentence */
export function complain(sentence) {
	process.stderr.write(`\n${sentence}\n`);
}
