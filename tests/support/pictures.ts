import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { deflateSync } from 'node:zlib';
import { crc32 } from 'node:zlib';
import sharp from 'sharp';
import type { IncomingFile } from '../../src/lib/server/services/files';

/** What a telephone writes into a photo of 12 May 2026 beside a salt lake, held sideways. */
const TELEPHONE = {
	IFD0: { Make: 'Invented', Model: 'Pocket 1', Copyright: 'Ida Fenn' },
	IFD3: {
		GPSLatitudeRef: 'S',
		GPSLatitude: '28/1 30/1 0/1',
		GPSLongitudeRef: 'E',
		GPSLongitude: '137/1 12/1 0/1'
	}
};
export const SIDEWAYS = 6;

/** A picture that is no photo of anything: coloured noise that does not compress to nothing. */
export function drawNoise(width: number, height: number) {
	return sharp({
		create: {
			width,
			height,
			channels: 3,
			background: '#888888',
			noise: { type: 'gaussian', mean: 128, sigma: 40 }
		}
	});
}

/** A photo as a telephone sends it: on its side, with where and by whom it was taken. */
export async function telephonePhoto(width = 1200, height = 900): Promise<Buffer> {
	return drawNoise(width, height)
		.withExif(TELEPHONE)
		.withMetadata({ orientation: SIDEWAYS, exif: TELEPHONE })
		.jpeg({ quality: 80 })
		.toBuffer();
}

function pngChunk(type: string, data: Buffer): Buffer {
	const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
	const length = Buffer.alloc(4);
	length.writeUInt32BE(data.length);
	const sum = Buffer.alloc(4);
	sum.writeUInt32BE(crc32(body) >>> 0);
	return Buffer.concat([length, body, sum]);
}

/** A PNG of a few bytes that says it is so large; unpacked it would fill the memory. */
export function hugePng(width: number, height: number): Buffer {
	const header = Buffer.alloc(13);
	header.writeUInt32BE(width, 0);
	header.writeUInt32BE(height, 4);
	header.set([1, 0, 0, 0, 0], 8);
	return Buffer.concat([
		Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
		...[
			pngChunk('IHDR', header),
			pngChunk('IDAT', deflateSync(Buffer.alloc(1024))),
			pngChunk('IEND', Buffer.alloc(0))
		]
	]);
}

export const PDF = Buffer.from('%PDF-1.4\n1 0 obj<</Type/Catalog>>endobj\ntrailer<</Root 1 0 R>>\n%%EOF\n');
export const SVG = Buffer.from(
	'<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>'
);
/** The head of a HEIC file, which is all that is looked at before it is told that it cannot be read. */
export const HEIC = Buffer.concat([
	Buffer.from([0, 0, 0, 24]),
	Buffer.from('ftypheic\0\0\0\0mif1heic', 'latin1'),
	Buffer.alloc(64)
]);

/** Puts bytes onto the disk as a file that came in, for the length of some work. */
export async function asIncoming<T>(
	name: string,
	bytes: Uint8Array,
	work: (file: IncomingFile) => Promise<T>
): Promise<T> {
	const folder = await mkdtemp(join(tmpdir(), 'soakline-incoming-'));
	try {
		const path = join(folder, 'file');
		await writeFile(path, bytes);
		return await work({ name, path });
	} finally {
		await rm(folder, { recursive: true });
	}
}
