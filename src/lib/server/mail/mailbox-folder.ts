import { open, readFile, readdir, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { simpleParser, type ParsedMail } from 'mailparser';

const HEADER_BYTES = 8_192;
/** Files that are open at a time. */
const AT_ONCE = 50;
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
	const letters: KeptLetter[] = [];
	for (let from = 0; from < newest.length; from += AT_ONCE) {
		const read = newest.slice(from, from + AT_ONCE).map(async (name) => {
			const file = join(folder, name);
			const messageId = await readMessageId(file).catch(() => null);
			return messageId === null ? [] : [{ file, messageId }];
		});
		letters.push(...(await Promise.all(read)).flat());
	}
	return letters;
}

/** One letter, its text as it came; its HTML is never used. */
export async function readKeptLetter(file: string): Promise<ParsedMail> {
	return simpleParser(await readFile(file), {
		skipHtmlToText: true,
		skipTextToHtml: true,
		skipImageLinks: true
	});
}

/** Takes a letter out of its folder for good; one that is gone already is no error. */
export const removeKeptLetter = (file: string): Promise<void> => rm(file, { force: true });
