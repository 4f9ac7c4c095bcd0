import { randomInt } from 'node:crypto';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { readJson, writeWhole } from './files.mjs';
import { Trouble } from './trouble.mjs';

/** Below the range that the kernel hands out to outgoing connections. */
const OWN_PORTS = { from: 21_000, to: 30_000 };
const TRIES = 200;

/**
 * What keeps a program from listening there, or null when nothing does.
 * @param {number} port
 * @param {string} host
 * @returns {Promise<string | null>}
 */
export function portTrouble(port, host) {
	return new Promise((resolve) => {
		const probe = createServer();
		probe.once('error', (/** @type {NodeJS.ErrnoException} */ error) => resolve(error.code ?? error.message));
		probe.listen({ port, host, exclusive: true }, () => probe.close(() => resolve(null)));
	});
}

/**
 * @param {string | undefined} words as in the environment
 * @returns {number}
 */
export function parsePort(words, fallback = 4173) {
	if (words === undefined || words.trim() === '') return fallback;
	const port = Number(words);
	if (!/^\d+$/.test(words.trim()) || port < 1 || port > 65_535) {
		throw new Trouble(`PORT is "${words}": it has to be a whole number from 1 to 65535.`);
	}
	return port;
}

/**
 * Refuses an address that somebody else has, before anything is begun.
 * @param {number} port
 * @param {string} host
 */
export async function requireFreeAddress(port, host) {
	// A server on the other loopback would answer at http://localhost in our place.
	const hosts = host === '127.0.0.1' ? [host, '::1'] : [host];
	for (const each of hosts) {
		const trouble = await portTrouble(port, each);
		if (each === '::1' && trouble !== 'EADDRINUSE') continue;
		if (trouble) throw new Trouble(addressSentence(trouble, port, each));
	}
}

/** @param {string} code @param {number} port @param {string} host */
export function addressSentence(code, port, host) {
	const other = `choose another with PORT=${port < 65_000 ? port + 1 : port - 1}`;
	switch (code) {
		case 'EADDRINUSE':
			return `Port ${port} on ${host} is in use by another program: stop that one or ${other}.`;
		case 'EACCES':
			return `This account may not listen on port ${port}: choose one above 1023, such as PORT=4173.`;
		case 'EADDRNOTAVAIL':
		case 'ENOTFOUND':
		case 'EAI_AGAIN':
			return `This machine has no address "${host}" to listen on: set HOST to one that it has, such as 127.0.0.1.`;
		default:
			return `Listening on port ${port} of ${host} did not work (${code}): ${other}.`;
	}
}

/**
 * A free port of our own, other than those already taken by name.
 * @param {Iterable<number>} [taken]
 * @param {(port: number) => Promise<boolean>} [isFree]
 */
export async function chooseFreePort(taken = [], isFree = isFreeHere) {
	const avoid = new Set(taken);
	for (let n = 0; n < TRIES; n++) {
		const port = randomInt(OWN_PORTS.from, OWN_PORTS.to);
		if (!avoid.has(port) && (await isFree(port))) return port;
	}
	throw new Trouble(`No free port between ${OWN_PORTS.from} and ${OWN_PORTS.to} on 127.0.0.1.`);
}

/** @param {number} port */
async function isFreeHere(port) {
	return (await portTrouble(port, '127.0.0.1')) === null;
}

/** @param {string} folder */
const fileIn = (folder) => join(folder, 'ports.json');

/**
 * @param {string} folder
 * @returns {Promise<Record<string, unknown>>}
 */
async function readPorts(folder) {
	return /** @type {Record<string, unknown>} */ ((await readJson(fileIn(folder))) ?? {});
}

/** @param {unknown} port @returns {port is number} */
const isPort = (port) => typeof port === 'number' && Number.isInteger(port) && port > 1023 && port < 65_536;

/**
 * The ports that a running start holds, for a command beside it: as they were written down, never chosen anew.
 * @param {string} folder
 * @returns {Promise<{ database: number, mail: number }>}
 */
export async function heldPorts(folder) {
	const { database, mail } = await readPorts(folder);
	if (isPort(database) && isPort(mail)) return { database, mail };
	throw new Trouble('Nothing was ever started here.');
}

/**
 * The ports of the database and the mail server: the same ones as last time, unless somebody else has them now.
 * @param {string} folder
 * @returns {Promise<{ database: number, mail: number }>}
 */
export async function rememberedPorts(folder) {
	const last = await readPorts(folder);
	const database = await keepOrChoose(last.database, []);
	const mail = await keepOrChoose(last.mail, [database]);
	if (database !== last.database || mail !== last.mail) {
		await writeWhole(fileIn(folder), `${JSON.stringify({ database, mail })}\n`);
	}
	return { database, mail };
}

/** @param {unknown} last @param {number[]} taken */
async function keepOrChoose(last, taken) {
	if (isPort(last) && !taken.includes(last) && (await isFreeHere(last))) return last;
	return chooseFreePort(taken);
}
