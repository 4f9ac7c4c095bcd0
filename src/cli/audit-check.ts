import { applicationEnv } from './lib/application.mjs';
import { STATE, stateFolders } from './lib/folders.mjs';
import { databaseEnv, localConnection } from './lib/mariadb.mjs';
import { heldPorts } from './lib/ports.mjs';
import { loadSecrets } from './lib/secrets.mjs';

const WHOLE = 0;
const BROKEN = 1;
const NOT_CHECKED = 2;

/** Where the database is: as the environment says, or the one that `npm start` keeps here. */
async function findDatabase(): Promise<NodeJS.ProcessEnv> {
	if (process.env.DATABASE_PASSWORD) return process.env;
	const [secrets, ports] = await Promise.all([loadSecrets(STATE), heldPorts(STATE)]);
	const database = databaseEnv(localConnection({ port: ports.database, password: secrets.databasePassword }));
	const mail = { SMTP_URL: `smtp://127.0.0.1:${ports.mail}` };
	return applicationEnv({
		host: '127.0.0.1',
		port: 4173,
		secrets,
		database,
		mail,
		files: stateFolders(STATE).files
	});
}

function readIds(words: readonly string[]): number[] {
	const wrong = words.find((word) => !/^[1-9]\d{0,14}$/.test(word));
	if (wrong !== undefined) throw new Error(`"${wrong}" is not the number of a workshop.`);
	return words.map(Number);
}

async function checkAll(ids: readonly number[]): Promise<number> {
	Object.assign(process.env, await findDatabase());
	const { closeConnection, connection } = await import('../lib/server/db/connection');
	const { initModels } = await import('../lib/server/db/models');
	const { checkTrails } = await import('../lib/server/services/audit-check');
	initModels(connection());
	try {
		const checks = await checkTrails(ids);
		if (checks.length === 0) throw new Error('There is no such workshop.');
		for (const { workshopId, workshopName, entries, headHash, finding } of checks) {
			const about = `workshop ${workshopId}, ${workshopName}`;
			console.log(
				finding ? `NOT WHOLE  ${about}: ${finding}` : `whole      ${about}: ${entries} entries, ${headHash}`
			);
		}
		return checks.some(({ finding }) => finding !== null) ? BROKEN : WHOLE;
	} finally {
		await closeConnection();
	}
}

try {
	process.exitCode = await checkAll(readIds(process.argv.slice(2)));
} catch (error) {
	const reason = error instanceof Error ? error.message : String(error);
	console.error(`The audit trail was not checked: ${reason} The database must be running: npm start.`);
	process.exitCode = NOT_CHECKED;
}
