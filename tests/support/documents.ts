import { execFile } from 'node:child_process';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import sharp from 'sharp';

const run = promisify(execFile);

/** A document as one reads it: its pages, the words in their order, the fonts it carries. */
export interface ReadDocument {
	pages: number;
	text: string;
	/** Only those that are carried inside. */
	fonts: string[];
	/** The share of each page that is not white, as it would be printed. */
	inkShares: number[];
}

async function inkShareOf(file: string): Promise<number> {
	const { data } = await sharp(await readFile(file))
		.greyscale()
		.raw()
		.toBuffer({ resolveWithObject: true });
	return data.reduce((dark, value) => dark + (value < 128 ? 1 : 0), 0) / data.length;
}

const embeddedFonts = (listing: string): string[] =>
	listing
		.split('\n')
		.slice(2)
		.map((line) => line.trim().split(/\s+/))
		.filter((words) => words.at(-5) === 'yes')
		.map(([name]) => name!.replace(/^[A-Z]+\+/, ''));

/** Reads a PDF with programs that had no part in making it. */
export async function readPdf(content: Buffer): Promise<ReadDocument> {
	const folder = await mkdtemp(join(tmpdir(), 'document-'));
	const file = join(folder, 'it.pdf');
	try {
		await writeFile(file, content);
		const { stdout: info } = await run('pdfinfo', [file]);
		const { stdout: text } = await run('pdftotext', ['-layout', file, '-']);
		const { stdout: fonts } = await run('pdffonts', [file]);
		await run('pdftoppm', ['-r', '60', '-png', file, join(folder, 'page')]);
		const pages = Number(/Pages:\s+(\d+)/.exec(info)![1]);
		const width = String(pages).length;
		const files = Array.from({ length: pages }, (_, index) =>
			join(folder, `page-${String(index + 1).padStart(width, '0')}.png`)
		);
		return { pages, text, fonts: embeddedFonts(fonts), inkShares: await Promise.all(files.map(inkShareOf)) };
	} finally {
		await rm(folder, { recursive: true, force: true });
	}
}
