import { open, type FileHandle } from 'node:fs/promises';
import { fileTypeFromBuffer } from 'file-type';
import type { FileKind } from '$lib/schemas/files';
import { refuseFile } from './file-refusals';
import { canReadHeic } from './pictures';

const HEAD_BYTES = 4_100;
/** Where a PDF says that it ends; readers look in its last kilobyte. */
const TAIL_BYTES = 1_024;
const PDF_START = '%PDF-';
const PDF_END = /%%EOF\s*$/;

const HEIC_MEDIA = ['image/heic', 'image/heif', 'image/heic-sequence', 'image/heif-sequence'];
const PHOTO_MEDIA = new Set(['image/jpeg', 'image/png', 'image/webp', ...HEIC_MEDIA]);
const SVG = /<svg[\s>]/i;
/** Control characters that no text has. */
// eslint-disable-next-line no-control-regex
const NO_TEXT = /[\x00-\x08\x0e-\x1f]/;

async function readPart(handle: FileHandle, from: number, length: number): Promise<Buffer> {
	const { buffer, bytesRead } = await handle.read(Buffer.alloc(length), 0, length, from);
	return buffer.subarray(0, bytesRead);
}

function refuseUnknown(name: string, head: Buffer): never {
	const text = head.toString('latin1');
	if (SVG.test(text)) throw refuseFile(name, 'svg');
	throw refuseFile(name, NO_TEXT.test(text) ? 'unknown' : 'text');
}

/**
 * What a file is by its own first bytes, never by its name: a photo to be made anew, or a document. A document is kept as
 * it is, and therefore must begin and end as one, so that it is nothing else besides.
 */
export async function lookAtFile(name: string, path: string): Promise<FileKind> {
	const handle = await open(path, 'r');
	try {
		const { size } = await handle.stat();
		if (size === 0) throw refuseFile(name, 'empty');
		const head = await readPart(handle, 0, HEAD_BYTES);
		const type = await fileTypeFromBuffer(head);
		if (!type || type.mime === 'application/xml') refuseUnknown(name, head);
		if (HEIC_MEDIA.includes(type.mime) && !canReadHeic) throw refuseFile(name, 'heic');
		if (PHOTO_MEDIA.has(type.mime)) return 'photo';
		if (type.mime !== 'application/pdf') throw refuseFile(name, 'other-kind', type.ext);
		const tail = await readPart(handle, Math.max(size - TAIL_BYTES, 0), TAIL_BYTES);
		const isWhole = head.toString('latin1').startsWith(PDF_START) && PDF_END.test(tail.toString('latin1'));
		if (!isWhole) throw refuseFile(name, 'pdf-end');
		return 'document';
	} finally {
		await handle.close();
	}
}
