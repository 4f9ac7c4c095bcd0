// Puts a workshop of invented installations beside the demo, into the database of a running `npm start`, so that the
// review can be looked at with as many of them as one likes.
import { parseArgs } from 'node:util';
import { applicationEnv } from './lib/application.mjs';
import { STATE, stateFolders } from './lib/folders.mjs';
import { inventWorkshop } from './lib/invent-workshop';
import { databaseEnv, localConnection } from './lib/mariadb.mjs';
import { heldPorts } from './lib/ports.mjs';
import { loadSecrets } from './lib/secrets.mjs';

const MOST = 1_000_000;

function readWhole(name: string, text: string, most: number): number {
	const value = Number(text);
	if (/^\d+$/.test(text) && value >= 1 && value <= most) return value;
	throw new Error(`--${name} is "${text}": it has to be a whole number from 1 to ${most}.`);
}

const { values } = parseArgs({
	options: {
		installations: { type: 'string', default: '1000' },
		seed: { type: 'string', default: '1' }
	}
});
const installations = readWhole('installations', values.installations, MOST);
const seed = readWhole('seed', values.seed, 2 ** 31);
const secrets = await loadSecrets(STATE);
const { database } = await heldPorts(STATE);
const connection = localConnection({ port: database, password: secrets.databasePassword });
const env = applicationEnv(
	{
		host: '127.0.0.1',
		port: 4173,
		secrets,
		database: databaseEnv(connection),
		mail: { SMTP_URL: 'smtp://127.0.0.1:1' },
		files: stateFolders(STATE).files
	},
	process.env
);
const { email, password } = await inventWorkshop(env, { installations, seed }, console.log);
console.log(`Sign in as ${email} with the password: ${password}`);
