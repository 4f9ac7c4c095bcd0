import { statfs } from 'node:fs/promises';
import { stripVTControlCharacters } from 'node:util';

/** A failure that is already one sentence for the person at the keyboard. */
export class Trouble extends Error {
	/** @param {string} sentence @param {{ cause?: unknown }} [options] */
	constructor(sentence, options) {
		super(sentence, options);
		this.name = 'Trouble';
	}
}

/** A first start brings the dependencies, a database and a build; a later one only adds rows and logs. */
export const FRESH_NEEDS_MB = 1000;
export const RUNNING_NEEDS_MB = 200;

const DISK_FULL = /ENOSPC|no space left on device|errno: 28\b|disk is full/i;

/** Lines that speak of an error and say nothing about it. */
const NOISE = /complete log|error code|^error during build:$|^npm (error|ERR!)\s*$/i;

const KNOWN_CODES = /** @type {Record<string, (where: string) => string>} */ ({
	ENOSPC: () => diskFullSentence(),
	EDQUOT: () => 'The disk quota of this account is used up: free some space and start again.',
	EACCES: (where) =>
		`This account may not write ${where}: give it the folder, or use the account that owns it.`,
	EPERM: (where) =>
		`This account may not change ${where}: give it the folder, or use the account that owns it.`,
	EROFS: (where) => `The disk is read-only, so ${where} cannot be written: use a folder on a writable disk.`,
	EMFILE: () => 'This account has too many files open: raise its limit (ulimit -n) and start again.'
});

function diskFullSentence() {
	return `The disk is full: free some space (a first start needs ${FRESH_NEEDS_MB} MB) and start again.`;
}

/**
 * Whether a program's own words say that the disk was full.
 * @param {string} words
 */
export function tellsOfFullDisk(words) {
	return DISK_FULL.test(words);
}

/**
 * One sentence for any failure.
 * @param {unknown} error
 * @returns {string}
 */
export function sentenceFor(error) {
	if (error instanceof Trouble) return error.message;
	if (!(error instanceof Error)) return `Something unexpected stopped it: ${String(error)}`;
	const { code, path } = /** @type {NodeJS.ErrnoException} */ (error);
	const known = code ? KNOWN_CODES[code] : undefined;
	if (known) return known(path ?? 'the project folder');
	return tellsOfFullDisk(error.message)
		? diskFullSentence()
		: `Something unexpected stopped it: ${error.message}`;
}

/**
 * The sentence for a program that failed, with the last thing it said and where the rest is.
 * @param {string} what
 * @param {string} words what the program printed
 * @param {string} logFile
 */
export function programTrouble(what, words, logFile) {
	if (tellsOfFullDisk(words)) return new Trouble(diskFullSentence());
	const telling = mostTellingLine(words);
	return new Trouble(`${what}${telling ? `: ${telling}` : ''} (the whole story is in ${logFile}).`);
}

/**
 * The line of a program's output that most likely says what went wrong.
 * @param {string} words
 */
export function mostTellingLine(words) {
	const lines = stripVTControlCharacters(words)
		.split('\n')
		.map((line) => line.trim())
		.filter((line) => line !== '' && !NOISE.test(line));
	const telling = lines.find((line) => /\berror\b|^E:/i.test(line)) ?? lines.at(-1) ?? '';
	return telling.slice(0, 200).replace(/[.:]$/, '');
}

/**
 * Refuses to begin on a disk that would fill up half way.
 * @param {string} folder
 * @param {number} leastMb
 */
export async function requireFreeSpace(folder, leastMb) {
	const { bavail, bsize } = await statfs(folder);
	const freeMb = Math.floor((bavail * bsize) / 1e6);
	if (freeMb < leastMb) {
		throw new Trouble(
			`Not enough room on the disk of ${folder}: ${freeMb} MB free, ${leastMb} MB needed; free some and start again.`
		);
	}
}

/**
 * @param {string} version as in process.versions.node
 */
export function requireNode(version) {
	const [major = 0, minor = 0] = version.split('.').map(Number);
	if (major !== 20 || minor < 19) {
		throw new Trouble(`Soakline runs on Node 20.19 or a later 20; this is Node ${version}.`);
	}
}
