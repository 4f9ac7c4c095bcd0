import { randomBytes } from 'node:crypto';
import { open, readFile, rename, rm } from 'node:fs/promises';

/**
 * Writes a file whole or not at all.
 * @param {string} path
 * @param {string} text
 * @param {number} [mode]
 */
export async function writeWhole(path, text, mode = 0o600) {
	const draft = `${path}.${randomBytes(4).toString('hex')}.tmp`;
	try {
		const file = await open(draft, 'wx', mode);
		try {
			await file.writeFile(text);
			await file.sync();
		} finally {
			await file.close();
		}
		await rename(draft, path);
	} catch (error) {
		await rm(draft, { force: true });
		throw error;
	}
}

/**
 * A JSON file's content, or null when there is none or it is not JSON.
 * @param {string} path
 * @returns {Promise<unknown>}
 */
export async function readJson(path) {
	try {
		return JSON.parse(await readFile(path, 'utf8'));
	} catch (error) {
		const { code } = /** @type {NodeJS.ErrnoException} */ (error);
		if (code === 'ENOENT' || code === 'ENOTDIR' || error instanceof SyntaxError) return null;
		throw error;
	}
}
