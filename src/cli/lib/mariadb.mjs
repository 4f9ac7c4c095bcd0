import { mkdir, readFile, readdir, rename, rm, stat } from 'node:fs/promises';
import { userInfo } from 'node:os';
import { basename, join } from 'node:path';
import { connect } from 'node:net';
import { setTimeout as sleep } from 'node:timers/promises';
import { writeWhole } from './files.mjs';
import { locate } from './packages.mjs';
import { launch, run } from './processes.mjs';
import { Trouble, mostTellingLine, programTrouble, tellsOfFullDisk } from './trouble.mjs';

/**
 * @typedef {{ host: string, port: number, name: string, user: string, password: string }} Connection
 * @typedef {{ dataDir: string, logFile: string, connection: Connection }} Server
 */

const UP_WITHIN_MS = 60_000;
const STOP_WITHIN_MS = 30_000;
const HOST = '127.0.0.1';
const SOCKET = 'mariadb.sock';

/** Rights on its own database: rows, tables, and the triggers that keep the audit trail append-only. */
const RIGHTS = [
	'SELECT',
	'INSERT',
	'UPDATE',
	'DELETE',
	'CREATE',
	'ALTER',
	'DROP',
	'INDEX',
	'REFERENCES',
	'TRIGGER',
	'LOCK TABLES',
	'CREATE TEMPORARY TABLES'
];

/**
 * An acknowledged write survives a power cut, and two people editing one row never lose a change unseen.
 */
const DURABLE = [
	'--innodb-flush-log-at-trx-commit=1',
	'--sync-binlog=1',
	'--log-bin=binlog',
	'--binlog-format=ROW',
	'--binlog-expire-logs-seconds=604800',
	'--max-binlog-size=64M',
	'--server-id=1',
	'--innodb-snapshot-isolation=ON',
	'--log-bin-trust-function-creators=1'
];

/**
 * @param {{ port: number, password: string }} own
 * @returns {Connection}
 */
export function localConnection({ port, password }) {
	return { host: HOST, port, name: 'soakline', user: 'soakline', password };
}

/**
 * What the application reads its connection from.
 * @param {Connection} connection
 * @returns {Record<string, string>}
 */
export function databaseEnv({ host, port, name, user, password }) {
	return {
		DATABASE_HOST: host,
		DATABASE_PORT: String(port),
		DATABASE_NAME: name,
		DATABASE_USER: user,
		DATABASE_PASSWORD: password
	};
}

/**
 * The statements that make the database and its one account; one a line, as the server wants them.
 * @param {Connection} connection
 */
export function initStatements({ name, user, password }) {
	const account = `'${user}'@'${HOST}'`;
	return `${[
		`CREATE DATABASE IF NOT EXISTS \`${name}\` CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`,
		`CREATE USER IF NOT EXISTS ${account} IDENTIFIED BY '${password}'`,
		`ALTER USER ${account} IDENTIFIED BY '${password}'`,
		`GRANT ${RIGHTS.join(', ')} ON \`${name}\`.* TO ${account}`
	].join(';\n')};\n`;
}

/** Only root has to be told that the server may run as root. */
function rootArgs() {
	return process.getuid?.() === 0 ? ['--user=root'] : [];
}

/** @param {string} dataDir */
async function exists(dataDir) {
	return stat(join(dataDir, 'mysql')).then(
		() => true,
		() => false
	);
}

/**
 * Makes the data directory when there is none: under another name first, so that a failure leaves nothing.
 * @param {Server} server
 * @returns {Promise<boolean>} whether it was made now
 */
export async function ensureDataDirectory({ dataDir, logFile }) {
	const draft = `${dataDir}.draft`;
	await rm(draft, { recursive: true, force: true });
	if (await exists(dataDir)) return false;
	const initialiser = await needed('mariadb-install-db');
	try {
		await mkdir(draft, { mode: 0o700 });
		const { code, output } = await run(
			initialiser,
			[
				'--no-defaults',
				...rootArgs(),
				`--datadir=${draft}`,
				'--auth-root-authentication-method=socket',
				`--auth-root-socket-user=${userInfo().username}`,
				'--skip-test-db',
				'--skip-name-resolve'
			],
			{ logFile }
		);
		if (code !== 0) throw programTrouble("The database's data directory could not be made", output, logFile);
		await rm(dataDir, { recursive: true, force: true });
		await rename(draft, dataDir);
		return true;
	} catch (error) {
		await rm(draft, { recursive: true, force: true });
		throw error;
	}
}

/** @param {string} program */
async function needed(program) {
	const path = await locate(program);
	if (!path) throw new Trouble(`MariaDB is not whole: ${program} is missing.`);
	return path;
}

/**
 * The process that serves a data directory, from the kernel's own list: a pid file can be stale or gone.
 * @param {string} dataDir
 * @returns {Promise<number | null>}
 */
export async function findServer(dataDir) {
	for (const name of await readdir('/proc')) {
		if (!/^\d+$/.test(name)) continue;
		const words = await readFile(`/proc/${name}/cmdline`, 'utf8').catch(() => '');
		const [program = '', ...args] = words.split('\0');
		if (basename(program) === 'mariadbd' && args.includes(`--datadir=${dataDir}`)) return Number(name);
	}
	return null;
}

/** @param {number} pid */
async function isAlive(pid) {
	const words = await readFile(`/proc/${pid}/stat`, 'utf8').catch(() => null);
	// A zombie has given up its files already.
	return words !== null && !/\) Z /.test(words);
}

/**
 * Stops a server that an earlier start, ended hard, has left on this data directory.
 * @param {string} dataDir
 * @returns {Promise<boolean>} whether there was one
 */
export async function stopLeftServer(dataDir) {
	const pid = await findServer(dataDir);
	if (pid === null || !(await isAlive(pid))) return false;
	process.kill(pid, 'SIGTERM');
	const deadline = Date.now() + STOP_WITHIN_MS;
	while (await isAlive(pid)) {
		if (Date.now() > deadline) {
			throw new Trouble(
				`A database server from an earlier start (process ${pid}) does not stop: end it and start again.`
			);
		}
		await sleep(50);
	}
	return true;
}

/**
 * Whether a MariaDB greets us there; it does only once it has run its first statements.
 * @param {number} port
 * @returns {Promise<boolean>}
 */
function isGreeting(port) {
	return new Promise((resolve) => {
		const socket = connect({ host: HOST, port });
		const end = (/** @type {boolean} */ greeted) => {
			socket.destroy();
			resolve(greeted);
		};
		socket.setTimeout(500, () => end(false));
		socket.once('error', () => end(false));
		socket.once('close', () => end(false));
		// After the packet's header of four bytes comes the protocol's version, 10.
		socket.once('data', (packet) => end(packet.length > 5 && packet[4] === 10));
	});
}

/**
 * Starts the server on its data directory and waits until it takes connections.
 * @param {Server} server
 * @returns {Promise<import('./processes.mjs').Launched>}
 */
export async function startServer(server) {
	const { dataDir, logFile, connection } = server;
	const program = await needed('mariadbd');
	const initFile = `${dataDir}.init.sql`;
	await writeWhole(initFile, initStatements(connection));
	await rm(logFile, { force: true });
	try {
		const launched = launch(
			program,
			[
				'--no-defaults',
				...rootArgs(),
				`--datadir=${dataDir}`,
				// Relative to the data directory: a socket's full path may have no more than 107 characters.
				`--socket=${SOCKET}`,
				`--pid-file=${dataDir}.pid`,
				`--log-error=${logFile}`,
				`--port=${connection.port}`,
				`--bind-address=${HOST}`,
				'--character-set-server=utf8mb4',
				'--collation-server=utf8mb4_unicode_ci',
				'--default-time-zone=+00:00',
				'--skip-name-resolve',
				'--max-allowed-packet=64M',
				`--init-file=${initFile}`,
				...DURABLE
			],
			{ stdio: 'ignore' }
		);
		await waitUntilUp(launched, server);
		return launched;
	} finally {
		await rm(initFile, { force: true });
	}
}

/** @param {import('./processes.mjs').Launched} launched @param {Server} server */
async function waitUntilUp(launched, server) {
	let ended = false;
	const whenEnded = launched.ended.then(
		() => (ended = true),
		() => (ended = true)
	);
	const deadline = Date.now() + UP_WITHIN_MS;
	while (!ended && Date.now() < deadline) {
		if ((await isGreeting(server.connection.port)) && (await saysReady(server.logFile))) return;
		await Promise.race([sleep(40), whenEnded]);
	}
	await launched.stop();
	throw await downTrouble(server, ended);
}

/** @param {string} logFile */
async function saysReady(logFile) {
	return (await readFile(logFile, 'utf8').catch(() => '')).includes('ready for connections');
}

/** @param {Server} server @param {boolean} ended */
async function downTrouble({ logFile }, ended) {
	const words = await readFile(logFile, 'utf8').catch(() => '');
	const errors = words.split('\n').filter((line) => line.includes('[ERROR]'));
	if (tellsOfFullDisk(words)) return programTrouble('', words, logFile);
	const why = mostTellingLine(errors.join('\n').replace(/^.*\[ERROR\]\s*/gm, 'error: ')).replace(
		/^error: /,
		''
	);
	const how = ended ? 'stopped while starting' : `did not come up within ${UP_WITHIN_MS / 1000} s`;
	return new Trouble(`The database ${how}${why ? `: ${why}` : ''} (its log is ${logFile}).`);
}

/**
 * Makes the data directory if need be, stops what is left of an earlier start, and starts the server.
 * @param {Server} server
 * @param {(words: string) => void} [note]
 */
export async function openDatabase(server, note = () => undefined) {
	await stopLeftServer(server.dataDir);
	if (await ensureDataDirectory(server)) note('new data directory');
	note(`port ${server.connection.port}`);
	const launched = await startServer(server);
	return { launched, env: databaseEnv(server.connection) };
}
