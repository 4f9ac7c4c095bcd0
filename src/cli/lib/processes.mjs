import { spawn } from 'node:child_process';
import { createWriteStream } from 'node:fs';
import { Trouble } from './trouble.mjs';

/**
 * @typedef {import('node:child_process').ChildProcess} Child
 * @typedef {{ code: number | null, signal: NodeJS.Signals | null }} Ending
 * @typedef {{ child: Child, ended: Promise<Ending>, stop: (graceMs?: number) => Promise<void> }} Launched
 */

/** @type {Set<Launched>} */
const running = new Set();

let closing = false;

/** Whether everything has been told to stop; nothing is started from then on. */
export function isClosing() {
	return closing;
}

const KILL_AFTER_MS = 8000;
const KEPT_OUTPUT_CHARS = 20_000;

/** @param {Child} child @param {NodeJS.Signals} signal */
function signalGroup(child, signal) {
	try {
		if (child.pid) process.kill(-child.pid, signal);
	} catch {
		// The group has gone already.
	}
}

// The last resort when this process is about to end without having tidied up.
process.on('exit', () => {
	for (const { child } of running) signalGroup(child, 'SIGTERM');
});

/**
 * Starts a program in a process group of its own, so that Ctrl-C reaches only us and we stop things in order.
 * @param {string} command
 * @param {string[]} args
 * @param {import('node:child_process').SpawnOptions & { sparing?: boolean }} [options]
 *   sparing: never stopped by stopEverything (a package manager at work must not be cut off)
 * @returns {Launched}
 */
export function launch(command, args, { sparing = false, ...options } = {}) {
	if (closing) throw new Trouble('Stopped.');
	const child = spawn(command, args, { stdio: ['ignore', 'pipe', 'pipe'], detached: true, ...options });
	/** @type {Promise<Ending>} */
	const ended = new Promise((resolve, reject) => {
		child.once('error', reject);
		child.once('close', (code, signal) => resolve({ code, signal }));
	});
	/** @type {Launched} */
	const launched = { child, ended, stop: (graceMs = KILL_AFTER_MS) => stopLaunched(launched, graceMs) };
	if (!sparing) running.add(launched);
	const forget = () => running.delete(launched);
	ended.then(forget, forget);
	return launched;
}

/** @param {Launched} launched @param {number} graceMs */
async function stopLaunched({ child, ended }, graceMs) {
	if (child.exitCode !== null || child.signalCode !== null || !child.pid) return;
	signalGroup(child, 'SIGTERM');
	const kill = setTimeout(() => signalGroup(child, 'SIGKILL'), graceMs);
	await ended.catch(() => undefined);
	clearTimeout(kill);
}

/** Stops whatever is still running, for good. */
export async function stopEverything() {
	closing = true;
	await Promise.all([...running].map((launched) => launched.stop()));
}

/**
 * Runs a program to its end, its output into a log file; what it printed comes back too.
 * @param {string} command
 * @param {string[]} args
 * @param {{ cwd?: string, env?: NodeJS.ProcessEnv, logFile?: string, sparing?: boolean, keepChars?: number }} options
 * @returns {Promise<{ code: number, output: string }>}
 */
export async function run(command, args, { logFile, keepChars = KEPT_OUTPUT_CHARS, ...options }) {
	const log = logFile ? createWriteStream(logFile, { flags: 'w' }) : null;
	/** @type {Error | null} */
	let logTrouble = null;
	log?.on('error', (error) => (logTrouble = error));
	const { child, ended } = launch(command, args, options);
	let output = '';
	for (const stream of [child.stdout, child.stderr]) {
		stream?.setEncoding('utf8');
		stream?.on('data', (/** @type {string} */ words) => {
			output = (output + words).slice(-keepChars);
			if (!logTrouble) log?.write(words);
		});
	}
	const { code } = await ended;
	if (log && !logTrouble) await new Promise((resolve) => log.end(() => resolve(null)));
	if (logTrouble) throw logTrouble;
	return { code: code ?? 1, output };
}

/**
 * Runs npm with the same npm that runs us.
 * @param {string[]} args
 * @param {{ cwd: string, env?: NodeJS.ProcessEnv, logFile?: string }} options
 */
export function runNpm(args, options) {
	const npm = process.env.npm_execpath;
	return npm ? run(process.execPath, [npm, ...args], options) : run('npm', args, options);
}
