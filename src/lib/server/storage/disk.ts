import { randomBytes } from 'node:crypto';
import { mkdir, open, opendir, readFile, rename, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { STORAGE_KEY, type Storage, type StoredContent } from './storage';

const FOLDER_LETTERS = 2;
/** Of a content that is read piece by piece. */
const PIECE_BYTES = 64 * 1024;

function requireKey(key: string): string {
	if (!STORAGE_KEY.test(key)) throw new Error(`"${key}" is not a key of the storage.`);
	return key;
}

const isMissing = (error: unknown): boolean => (error as { code?: string } | null)?.code === 'ENOENT';

/** To the disk itself: after a power cut a row must not speak of a content that was only in memory. */
async function writeThrough(path: string, content: Uint8Array): Promise<void> {
	const handle = await open(path, 'wx', 0o600);
	try {
		await handle.writeFile(content);
		await handle.sync();
	} finally {
		await handle.close();
	}
}

/** To the disk itself, as with what is written here. */
async function syncFile(path: string): Promise<void> {
	const handle = await open(path, 'r+');
	try {
		await handle.sync();
	} finally {
		await handle.close();
	}
}

async function syncFolder(folder: string): Promise<void> {
	const handle = await open(folder, 'r');
	try {
		await handle.sync();
	} finally {
		await handle.close();
	}
}

async function* listFolder(folder: string): AsyncGenerator<StoredContent> {
	for await (const entry of await opendir(folder)) {
		if (!STORAGE_KEY.test(entry.name)) continue;
		const found = await stat(join(folder, entry.name)).catch(() => null);
		if (found) yield { key: entry.name, putAt: found.mtime };
	}
}

/** Keeps contents in a folder, under folders of the first two letters of their keys. */
export function diskStorage(root: string): Storage {
	const folderOf = (key: string): string => join(root, requireKey(key).slice(0, FOLDER_LETTERS));
	const pathOf = (key: string): string => join(folderOf(key), key);
	return {
		async put(key, content) {
			const folder = folderOf(key);
			await mkdir(folder, { recursive: true, mode: 0o700 });
			const unfinished = join(folder, `.${key}.${randomBytes(6).toString('hex')}`);
			try {
				await writeThrough(unfinished, content);
				await rename(unfinished, pathOf(key));
				await syncFolder(folder);
			} catch (error) {
				await rm(unfinished, { force: true });
				throw error;
			}
		},
		async putFile(key, path) {
			const folder = folderOf(key);
			await mkdir(folder, { recursive: true, mode: 0o700 });
			await syncFile(path);
			await rename(path, pathOf(key));
			await syncFolder(folder);
		},
		async readPieces(key) {
			try {
				const handle = await open(pathOf(key), 'r');
				return handle.createReadStream({ highWaterMark: PIECE_BYTES }) as AsyncIterable<Uint8Array>;
			} catch (error) {
				if (isMissing(error)) return null;
				throw error;
			}
		},
		async read(key) {
			return readFile(pathOf(key)).catch((error: unknown) => {
				if (isMissing(error)) return null;
				throw error;
			});
		},
		async remove(key) {
			await rm(pathOf(key), { force: true });
		},
		async *list() {
			const entries = await opendir(root).catch(() => null);
			if (!entries) return;
			for await (const entry of entries) {
				if (entry.isDirectory() && entry.name.length === FOLDER_LETTERS) {
					yield* listFolder(join(root, entry.name));
				}
			}
		}
	};
}
