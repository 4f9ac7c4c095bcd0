import { open, readFile, rm } from 'node:fs/promises';
import { setTimeout as sleep } from 'node:timers/promises';
import { Trouble } from './trouble.mjs';

const WAIT_MS = 250;

/**
 * When a process began, in clock ticks since boot; null when there is none. A number can be given out again, the
 * pair of number and beginning cannot.
 * @param {number} pid
 */
export async function processBeginning(pid) {
	const words = await readFile(`/proc/${pid}/stat`, 'utf8').catch(() => null);
	// The program's name, in parentheses, may itself hold spaces; field 22 is the twentieth after it.
	return words?.slice(words.lastIndexOf(')') + 2).split(' ')[19] ?? null;
}

/**
 * The process that holds a lock file, or null when nobody alive does.
 * @param {string} file
 * @returns {Promise<number | null>}
 */
async function holderOf(file) {
	const words = await readFile(file, 'utf8').catch(() => '');
	const [pid, beginning] = words.trim().split(' ');
	if (!pid || !beginning) return null;
	return (await processBeginning(Number(pid))) === beginning ? Number(pid) : null;
}

/**
 * Takes a lock file, or tells who has it.
 * @param {string} file
 * @returns {Promise<{ release: () => Promise<void> } | { holder: number }>}
 */
async function tryLock(file) {
	const mine = `${process.pid} ${await processBeginning(process.pid)}\n`;
	for (;;) {
		try {
			const handle = await open(file, 'wx', 0o600);
			await handle.writeFile(mine);
			await handle.close();
			return { release: () => rm(file, { force: true }) };
		} catch (error) {
			if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EEXIST') throw error;
			const holder = await holderOf(file);
			if (holder !== null) return { holder };
			await rm(file, { force: true });
		}
	}
}

/**
 * Takes a lock or refuses with a sentence.
 * @param {string} file
 * @param {(holder: number) => string} sentence
 */
export async function takeLock(file, sentence) {
	const lock = await tryLock(file);
	if ('holder' in lock) throw new Trouble(sentence(lock.holder));
	return lock;
}

/**
 * Does work that only one process at a time may do in this checkout, after waiting for its turn.
 * @template T
 * @param {string} file
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function inTurn(file, work) {
	for (;;) {
		const lock = await tryLock(file);
		if ('release' in lock) {
			try {
				return await work();
			} finally {
				await lock.release();
			}
		}
		await sleep(WAIT_MS);
	}
}
