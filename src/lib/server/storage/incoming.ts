import { randomBytes } from 'node:crypto';
import { mkdir, readdir, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { env } from '../env';

/** Beside what is kept, so that a folder of temporary files in memory is not filled. */
const folder = (): string => join(env().SOAKLINE_FILES_DIR, 'incoming');

/** A path for a file while it comes in. */
export async function newIncomingPath(): Promise<string> {
	await mkdir(folder(), { recursive: true, mode: 0o700 });
	return join(folder(), randomBytes(16).toString('hex'));
}

/** Removes what came in before a moment and was left there, as when the application was ended hard. */
export async function clearIncoming(before: Date): Promise<number> {
	const names = await readdir(folder()).catch(() => [] as string[]);
	let cleared = 0;
	for (const name of names) {
		const path = join(folder(), name);
		const found = await stat(path).catch(() => null);
		if (!found || found.mtime >= before) continue;
		await rm(path, { force: true });
		cleared++;
	}
	return cleared;
}
