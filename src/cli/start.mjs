// Brings up everything that Soakline needs on this machine and keeps it up until Ctrl-C. Uses Node's own modules only:
// it runs before anything is installed.
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { applicationEnv, startApplication } from './lib/application.mjs';
import { ensureBuild } from './lib/build.mjs';
import { demoSignIns, readDemoPeople } from './lib/demo-people.mjs';
import { ensureDependencies } from './lib/dependencies.mjs';
import { PROJECT, STATE, makeStateFolders } from './lib/folders.mjs';
import { keepRunning } from './lib/keep-running.mjs';
import { inTurn, takeLock } from './lib/lock.mjs';
import { mailEnv, startMailbox } from './lib/mailbox.mjs';
import { databaseEnv, localConnection, openDatabase, stopLeftServer } from './lib/mariadb.mjs';
import { MARIADB, ensureInstalled, requireInstallable } from './lib/packages.mjs';
import { parsePort, rememberedPorts, requireFreeAddress } from './lib/ports.mjs';
import { stopEverything } from './lib/processes.mjs';
import { loadSecrets } from './lib/secrets.mjs';
import { complain, say, sayTime, step, stepDone } from './lib/steps.mjs';
import { onStopSignal } from './lib/stop-signal.mjs';
import {
	FRESH_NEEDS_MB,
	RUNNING_NEEDS_MB,
	requireFreeSpace,
	requireNode,
	sentenceFor
} from './lib/trouble.mjs';

const dev = process.argv.includes('--dev');

/** @type {import('./lib/keep-running.mjs').Kept[]} in the order of starting */
const kept = [];

/** Refuses, before anything is changed, what could not go through. */
async function checkBeforehand() {
	requireNode(process.versions.node);
	const port = parsePort(process.env.PORT);
	const host = process.env.HOST || '127.0.0.1';
	const isFresh = !existsSync(join(PROJECT, 'node_modules')) || !existsSync(join(STATE, 'db'));
	await requireFreeSpace(PROJECT, isFresh ? FRESH_NEEDS_MB : RUNNING_NEEDS_MB);
	await requireInstallable([MARIADB]);
	return { port, host };
}

/** @param {import('./lib/folders.mjs').StateFolders} folders */
async function prepare(folders) {
	const log = (/** @type {string} */ name) => join(folders.log, `${name}.log`);
	await step('Packages', (note) => ensureInstalled(MARIADB, log('packages'), note));
	await step('Dependencies', (note) =>
		inTurn(join(folders.base, 'install.lock'), () => ensureDependencies(PROJECT, log('dependencies'), note))
	);
	if (!dev) {
		await step('Build', (note) =>
			ensureBuild(
				{ project: PROJECT, lockFile: join(folders.base, 'build.lock'), logFile: log('build') },
				note
			)
		);
	}
}

/** @param {import('./lib/folders.mjs').StateFolders} folders @param {import('./lib/secrets.mjs').Secrets} secrets */
async function startDatabase(folders, secrets) {
	const logFile = join(folders.log, 'mariadb.log');
	return step('Database', async (note) => {
		if (await stopLeftServer(folders.db)) note('stopped the one left by an earlier start');
		const ports = await rememberedPorts(folders.base);
		const connection = localConnection({ port: ports.database, password: secrets.databasePassword });
		const server = { dataDir: folders.db, logFile, connection };
		const first = (await openDatabase(server, note)).launched;
		const start = async () => (await openDatabase(server)).launched;
		kept.push(keepRunning({ name: 'The database', first, start, say, logFile }));
		return { env: databaseEnv(connection), ports };
	});
}

/** @param {import('./lib/folders.mjs').StateFolders} folders @param {number} port */
async function startMail(folders, port) {
	if (process.env.SMTP_URL) return {};
	return step('Mail', async (note) => {
		note(`kept in ${folders.mail}`);
		const where = { port, folder: folders.mail, logFile: join(folders.log, 'mail.log') };
		const first = await startMailbox(where);
		const start = () => startMailbox(where);
		kept.push(keepRunning({ name: 'The mail server', first, start, say, logFile: where.logFile }));
		return mailEnv(where);
	});
}

/** @param {import('./lib/application.mjs').AppStep} told */
function showAppStep({ step: name, ms, detail }) {
	if (name === 'ready') return;
	stepDone(`${name.charAt(0).toUpperCase()}${name.slice(1)}`, detail, ms);
}

/** @param {import('./lib/folders.mjs').StateFolders} folders @param {NodeJS.ProcessEnv} env */
async function startServer(folders, env) {
	const logFile = join(folders.log, 'app.log');
	let isUp = false;
	// What the reloading server says of itself while starting would break up the steps.
	const onPlain = (/** @type {string} */ line) => dev && isUp && say(line);
	const what = { project: PROJECT, env, logFile, dev, onPlain };
	const begun = performance.now();
	const first = await startApplication({ ...what, onStep: showAppStep });
	stepDone('Application', 'ready', performance.now() - begun);
	isUp = true;
	const start = () => startApplication(what);
	kept.push(keepRunning({ name: 'The application', first, start, say, logFile }));
}

/** @param {NodeJS.ProcessEnv} env @param {number} begun */
async function announce(env, begun) {
	say(`\nSoakline is ready at ${env.ORIGIN} after ${sayTime(performance.now() - begun)}. Ctrl-C stops it.`);
	if (env.SOAKLINE_DEMO !== '1') return;
	const lines = demoSignIns(await readDemoPeople(PROJECT));
	if (lines.length > 0) say(`\nSign in to the demo workshop as\n${lines.join('\n')}\n`);
}

async function bringUp() {
	const begun = performance.now();
	const { port, host } = await checkBeforehand();
	const folders = await makeStateFolders(STATE);
	const lock = await takeLock(
		join(STATE, 'start.lock'),
		(holder) => `Soakline is already running from this folder (process ${holder}): stop that one first.`
	);
	try {
		await requireFreeAddress(port, host);
		say(`Soakline${dev ? ', with live reload' : ''}\n`);
		const secrets = await loadSecrets(folders.base);
		await prepare(folders);
		const database = await startDatabase(folders, secrets);
		const mail = await startMail(folders, database.ports.mail);
		const { files } = folders;
		const env = applicationEnv({ host, port, secrets, database: database.env, mail, files, dev });
		await startServer(folders, env);
		await announce(env, begun);
		await Promise.race([stopSignal.received, ...kept.map(({ gaveUp }) => gaveUp)]);
	} finally {
		for (const each of kept.reverse()) await each.stop();
		await stopEverything();
		await lock.release();
	}
}

const stopSignal = onStopSignal(stopEverything);
try {
	await bringUp();
	say('\nStopped.');
} catch (error) {
	if (stopSignal.happened()) say('\nStopped.');
	else {
		complain(sentenceFor(error));
		process.exitCode = 1;
	}
}
process.exit();
