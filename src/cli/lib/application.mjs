import { createWriteStream } from 'node:fs';
import { rename, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { setTimeout as sleep } from 'node:timers/promises';
import { launch } from './processes.mjs';
import { Trouble, programTrouble, sentenceFor } from './trouble.mjs';

/**
 * @typedef {{ step: string, ms: number, detail: string }} AppStep
 * @typedef {{ step: AppStep } | { fatal: string } | { plain: string } | { entry: string }} Told
 */

const READY_WITHIN_MS = 120_000;
const LARGEST_LOG_BYTES = 10_000_000;
const WITH_PARENT = new URL('./exit-with-parent.mjs', import.meta.url).href;

/**
 * The environment that the application runs in.
 * @param {{ host: string, port: number, secrets: import('./secrets.mjs').Secrets, database: Record<string, string>, mail: Record<string, string>, files: string, dev?: boolean }} parts
 * @param {NodeJS.ProcessEnv} [given]
 * @returns {NodeJS.ProcessEnv}
 */
export function applicationEnv(
	{ host, port, secrets, database, mail, files, dev = false },
	given = process.env
) {
	const origin = given.ORIGIN || `http://localhost:${port}`;
	return {
		MAIL_FROM: 'Soakline <soakline@localhost>',
		SOAKLINE_DEMO: '1',
		BODY_SIZE_LIMIT: '210M',
		SOAKLINE_FILES_DIR: files,
		SHUTDOWN_TIMEOUT: '4',
		...given,
		...database,
		...mail,
		HOST: host,
		PORT: String(port),
		ORIGIN: origin,
		AUTH_URL: origin,
		AUTH_SECRET: secrets.authSecret,
		AUTH_TRUST_HOST: 'true',
		SOAKLINE_SECRET: secrets.tokenSecret,
		NODE_ENV: dev ? 'development' : 'production'
	};
}

/**
 * What one line of the application's output says.
 * @param {string} line
 * @returns {Told}
 */
export function readLine(line) {
	/** @type {unknown} */
	let entry;
	try {
		entry = JSON.parse(line);
	} catch {
		return { plain: line };
	}
	if (typeof entry !== 'object' || entry === null) return { plain: line };
	const { step, ms, detail, fatal } = /** @type {Record<string, unknown>} */ (entry);
	if (typeof fatal === 'string') return { fatal };
	if (typeof step !== 'string') return { entry: line };
	return {
		step: { step, ms: typeof ms === 'number' ? ms : 0, detail: typeof detail === 'string' ? detail : '' }
	};
}

/** @param {string} logFile */
async function openLog(logFile) {
	const size = await stat(logFile).then(
		(found) => found.size,
		() => 0
	);
	if (size > LARGEST_LOG_BYTES) await rename(logFile, `${logFile}.1`);
	return createWriteStream(logFile, { flags: 'a', mode: 0o600 });
}

/** @param {string} project @param {boolean} dev @param {NodeJS.ProcessEnv} env */
function programArgs(project, dev, env) {
	const vite = join(project, 'node_modules', 'vite', 'bin', 'vite.js');
	return dev
		? [
				vite,
				'dev',
				'--host',
				String(env.HOST),
				'--port',
				String(env.PORT),
				'--strictPort',
				'--clearScreen',
				'false'
			]
		: [join(project, 'build', 'index.js')];
}

/**
 * Starts the application and waits until it is ready to serve.
 * @param {{ project: string, env: NodeJS.ProcessEnv, logFile: string, dev?: boolean, onStep?: (step: AppStep) => void, onPlain?: (line: string) => unknown }} what
 */
export async function startApplication({ project, env, logFile, dev = false, onStep, onPlain }) {
	const log = await openLog(logFile);
	log.on('error', (error) => onPlain?.(`The log ${logFile} could not be written: ${sentenceFor(error)}`));
	const launched = launch(process.execPath, ['--import', WITH_PARENT, ...programArgs(project, dev, env)], {
		cwd: project,
		env,
		// Vite ends when its standard input does, so it gets one that stays open.
		stdio: ['pipe', 'pipe', 'pipe', 'ipc']
	});
	/** @type {{ fatal: string | null, last: string[] }} */
	const heard = { fatal: null, last: [] };
	for (const stream of [launched.child.stdout, launched.child.stderr]) {
		if (!stream) continue;
		createInterface({ input: stream }).on('line', (line) => {
			log.write(`${line}\n`);
			heard.last = [...heard.last, line].slice(-40);
			const told = readLine(line);
			if ('fatal' in told) heard.fatal ??= told.fatal;
			else if ('step' in told) onStep?.(told.step);
			else if ('plain' in told) onPlain?.(told.plain);
		});
	}
	launched.ended.then(
		() => log.end(),
		() => log.end()
	);
	await waitUntilReady(launched, env, heard, logFile);
	return launched;
}

/**
 * @param {import('./processes.mjs').Launched} launched
 * @param {NodeJS.ProcessEnv} env
 * @param {{ fatal: string | null, last: string[] }} heard
 * @param {string} logFile
 */
async function waitUntilReady(launched, env, heard, logFile) {
	let ended = false;
	const whenEnded = launched.ended.then(() => (ended = true));
	const deadline = Date.now() + READY_WITHIN_MS;
	while (!ended && !heard.fatal && Date.now() < deadline) {
		if (await answersReady(readyUrl(env))) return;
		await Promise.race([sleep(80), whenEnded]);
	}
	await launched.stop();
	if (heard.fatal) throw new Trouble(heard.fatal);
	const how = ended ? 'stopped before it was ready' : `was not ready within ${READY_WITHIN_MS / 1000} s`;
	throw programTrouble(`The application ${how}`, heard.last.join('\n'), logFile);
}

/** @param {NodeJS.ProcessEnv} env */
function readyUrl({ HOST = '127.0.0.1', PORT }) {
	const anyAddress = HOST === '0.0.0.0' || HOST === '::';
	const host = anyAddress ? 'localhost' : HOST.includes(':') ? `[${HOST}]` : HOST;
	return `http://${host}:${PORT}/readyz`;
}

/** @param {string} url */
async function answersReady(url) {
	try {
		const answer = await fetch(url, { signal: AbortSignal.timeout(5000), redirect: 'manual' });
		await answer.arrayBuffer();
		return answer.status === 200;
	} catch {
		return false;
	}
}
