import { open, readFile, readdir, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { simpleParser, type ParsedMail } from 'mailparser';

const HEADER_BYTES = 8_192;
const MESSAGE_ID = /^message-id:\s*(<[^<>\s]+>)/im;
const END_OF_HEADERS = /\r?\n\r?\n/;

export interface KeptLetter {
	file: string;
	messageId: string;
}

async function readMessageId(file: string): Promise<string | null> {
	const handle = await open(file);
	try {
		const { buffer, bytesRead } = await handle.read(Buffer.alloc(HEADER_BYTES), 0, HEADER_BYTES, 0);
		const [headers = ''] = buffer.toString('latin1', 0, bytesRead).split(END_OF_HEADERS, 1);
		return MESSAGE_ID.exec(headers)?.[1] ?? null;
	} finally {
		await handle.close();
	}
}

/** The newest letters in a folder of .eml files whose names begin with the moment they came; unreadable ones are left out. */
export async function listKeptLetters(folder: string, most: number): Promise<KeptLetter[]> {
	const names = await readdir(folder).catch(() => []);
	const files = names.filter((name) => name.endsWith('.eml')).sort();
	const newest = files.slice(-most).reverse();
	const letters = await Promise.all(
		newest.map(async (name) => {
			const file = join(folder, name);
			const messageId = await readMessageId(file).catch(() => null);
			return messageId === null ? [] : [{ file, messageId }];
		})
	);
	return letters.flat();
}

/** One letter, its text as it came; its HTML is never used. */
export async function readKeptLetter(file: string): Promise<ParsedMail> {
	return simpleParser(await readFile(file), {
		skipHtmlToText: true,
		skipTextToHtml: true,
		skipImageLinks: true
	});
}

/** Takes letters out of the folder for good, each as often as it lies there. */
export async function removeKeptLetters(folder: string, messageIds: readonly string[]): Promise<void> {
	const wanted = new Set(messageIds);
	const kept = await listKeptLetters(folder, Infinity);
	const theirs = kept.filter(({ messageId }) => wanted.has(messageId));
	await Promise.all(theirs.map(({ file }) => rm(file, { force: true })));
}
