import { randomBytes } from 'node:crypto';
import { chmod } from 'node:fs/promises';
import { join } from 'node:path';
import { readJson, writeWhole } from './files.mjs';

const NAMES = /** @type {const} */ (['databasePassword', 'authSecret', 'tokenSecret']);

/** @typedef {Record<typeof NAMES[number], string>} Secrets */

/** @returns {Secrets} */
export function makeSecrets() {
	const secret = () => randomBytes(32).toString('base64url');
	return { databasePassword: secret(), authSecret: secret(), tokenSecret: secret() };
}

/** @param {unknown} found @returns {found is Secrets} */
function isWhole(found) {
	if (typeof found !== 'object' || found === null) return false;
	const record = /** @type {Record<string, unknown>} */ (found);
	return NAMES.every((name) => typeof record[name] === 'string' && record[name].length >= 32);
}

/**
 * This checkout's secrets: made once, readable by this account alone.
 * @param {string} folder
 * @returns {Promise<Secrets>}
 */
export async function loadSecrets(folder) {
	const file = join(folder, 'secrets.json');
	const found = await readJson(file);
	if (isWhole(found)) {
		await chmod(file, 0o600);
		return found;
	}
	const secrets = { ...makeSecrets(), ...(typeof found === 'object' ? found : {}) };
	const whole = isWhole(secrets) ? secrets : makeSecrets();
	await writeWhole(file, `${JSON.stringify(whole, null, '\t')}\n`, 0o600);
	return whole;
}
