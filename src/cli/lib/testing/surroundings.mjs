import { mkdir, readdir, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { applicationEnv, startApplication } from '../application.mjs';
import { makeStateFolders } from '../folders.mjs';
import { processBeginning } from '../lock.mjs';
import { mailEnv, startMailbox } from '../mailbox.mjs';
import { databaseEnv, localConnection, openDatabase, stopLeftServer } from '../mariadb.mjs';
import { chooseFreePort } from '../ports.mjs';
import { makeSecrets } from '../secrets.mjs';

/** What a person may have set for their own use, and a test run must not take over. */
const PERSONAL =
	/^(HOST|PORT|ORIGIN|AUTH_.*|SMTP_URL|MAIL_FROM|MAILBOX_DIR|SOAKLINE_.*|DATABASE_.*|NODE_ENV|LOG_LEVEL|FORCE_COLOR)$/;

/** @param {NodeJS.ProcessEnv} [given] @returns {NodeJS.ProcessEnv} */
export function impersonalEnv(given = process.env) {
	const kept = Object.entries(given).filter(([name]) => !PERSONAL.test(name));
	return { ...Object.fromEntries(kept), NO_COLOR: '1' };
}

const PREFIX = 'test-';

/**
 * A folder for one run of the tests, named after its process.
 * @param {string} state
 */
export async function makeRunFolder(state) {
	const folder = join(state, `${PREFIX}${process.pid}-${await processBeginning(process.pid)}`);
	await mkdir(folder, { recursive: true, mode: 0o700 });
	return folder;
}

/**
 * Clears away what runs that were ended hard have left.
 * @param {string} state
 */
export async function clearLeftRuns(state) {
	const names = await readdir(state).catch(() => /** @type {string[]} */ ([]));
	for (const name of names.filter((each) => each.startsWith(PREFIX))) {
		const [pid, beginning] = name.slice(PREFIX.length).split('-');
		if ((await processBeginning(Number(pid))) === beginning) continue;
		for (const part of await readdir(join(state, name))) await stopLeftServer(join(state, name, part, 'db'));
		await rm(join(state, name), { recursive: true, force: true });
	}
}

/**
 * A database and a mail server of their own, and the environment that leads to them.
 * @param {string} base
 * @param {{ demo: boolean }} how
 */
export async function openSurroundings(base, { demo }) {
	const folders = await makeStateFolders(base);
	const secrets = makeSecrets();
	const databasePort = await chooseFreePort();
	const mailPort = await chooseFreePort([databasePort]);
	const appPort = await chooseFreePort([databasePort, mailPort]);
	const connection = localConnection({ port: databasePort, password: secrets.databasePassword });
	const server = { dataDir: folders.db, logFile: join(folders.log, 'mariadb.log'), connection };
	const database = await openDatabase(server);
	const mailbox = { port: mailPort, folder: folders.mail, logFile: join(folders.log, 'mail.log') };
	const mail = await startMailbox(mailbox);
	// Full outlooks have tests of their own; the browser's wait for many.
	const given = { ...impersonalEnv(), SOAKLINE_DEMO: demo ? '1' : '0', SOAKLINE_OUTLOOK: 'light' };
	const env = applicationEnv(
		{
			host: '127.0.0.1',
			port: appPort,
			secrets,
			database: databaseEnv(connection),
			mail: mailEnv(mailbox),
			files: folders.files
		},
		given
	);
	return {
		env,
		folders,
		close: async () => {
			await mail.stop();
			await database.launched.stop();
		}
	};
}

/**
 * The built application with its demo workshop, in surroundings of its own.
 * @param {string} project
 * @param {string} base
 */
export async function openApplication(project, base) {
	const surroundings = await openSurroundings(base, { demo: true });
	const { env, folders } = surroundings;
	const application = await startApplication({ project, env, logFile: join(folders.log, 'app.log') });
	return {
		env: { ...impersonalEnv(), E2E_BASE_URL: env.ORIGIN, MAILBOX_DIR: folders.mail },
		logFile: join(folders.log, 'app.log'),
		close: async () => {
			await application.stop();
			await surroundings.close();
		}
	};
}
