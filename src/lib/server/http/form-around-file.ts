import { readFile } from 'node:fs/promises';
import { readFormData } from './body';
import { fileMissing, fileTooLarge, FILE_FIELD } from './file-upload';
import { boundaryOf } from './multipart';
import { withSentFiles } from './sent-files';

/** A file that is too large is read past as far as this, so that the words beside it are not lost. */
const MOST_READ_BYTES = 200 * 1024 * 1024;

export interface FormAroundFile {
	/** The boxes; that of the file holds a hash of it, by which the same form sent twice is known. */
	sent: FormData;
	/** Null where none was chosen. */
	file: { bytes: Uint8Array | null } | null;
}

/** A form with one small file in it, whatever that file is like; one that can hold no file has none. */
export async function readFormAroundFile(request: Request, mostFileBytes: number): Promise<FormAroundFile> {
	if (boundaryOf(request.headers.get('content-type') ?? '') === null) {
		return { sent: await readFormData(request), file: null };
	}
	const limits = { mostFileBytes, mostFiles: 1, mostBytes: MOST_READ_BYTES };
	return withSentFiles(request, limits, async ({ fields, files: [file] }) => {
		const sent = new FormData();
		for (const [name, value] of fields) sent.set(name, value);
		sent.set(FILE_FIELD, file?.sha256 ?? '');
		if (!file) return { sent, file: null };
		return { sent, file: { bytes: file.isTooLarge ? null : await readFile(file.path) } };
	});
}

/** The bytes of the file that must be there, and not be too large. */
export function bytesOf({ file }: FormAroundFile, mostFileBytes: number): Uint8Array {
	if (file?.bytes === null) throw fileTooLarge(mostFileBytes);
	if (!file || file.bytes.byteLength === 0) throw fileMissing();
	return file.bytes;
}
