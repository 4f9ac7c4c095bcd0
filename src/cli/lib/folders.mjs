import { mkdir } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The folder of the checkout. */
export const PROJECT = dirname(dirname(dirname(dirname(fileURLToPath(import.meta.url)))));

/**
 * Where everything lives that is made on this machine and is not part of the source.
 * @param {string} base
 */
export function stateFolders(base) {
	return {
		base,
		db: join(base, 'db'),
		mail: join(base, 'mail'),
		log: join(base, 'log'),
		files: join(base, 'files')
	};
}

/** @typedef {ReturnType<typeof stateFolders>} StateFolders */

/**
 * Makes the folders, closed to other accounts.
 * @param {string} base
 * @returns {Promise<StateFolders>}
 */
export async function makeStateFolders(base) {
	const folders = stateFolders(base);
	await mkdir(folders.base, { recursive: true, mode: 0o700 });
	await mkdir(folders.mail, { recursive: true, mode: 0o700 });
	await mkdir(folders.log, { recursive: true, mode: 0o700 });
	await mkdir(folders.files, { recursive: true, mode: 0o700 });
	return folders;
}

export const STATE = join(PROJECT, '.soakline');
