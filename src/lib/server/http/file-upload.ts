import { AppError } from '../errors';
import { readBytes, readFormData } from './body';

/** A file as it was sent; it is kept nowhere. */
export interface SentFile {
	name: string;
	bytes: Uint8Array;
}

/** What the field of a form is called that has the file. */
export const FILE_FIELD = 'file';
/** Besides a form: the file itself as the body. */
export const FILE_MEDIA = ['text/plain', 'text/csv', 'application/octet-stream'] as const;

/** Boundaries and the other fields of a form around its file. */
const FORM_AROUND_FILE_BYTES = 64 * 1024;

export function fileTooLarge(mostBytes: number): AppError {
	const limit = `${Math.floor(mostBytes / 1024 / 1024)} MB`;
	const message = `The file is larger than ${limit}, the most that is read here.`;
	return new AppError('too_large', message, [{ path: FILE_FIELD, message }]);
}

export function fileMissing(): AppError {
	const message = 'The file is missing, or there is nothing in it: choose one.';
	return new AppError('invalid_input', message, [{ path: FILE_FIELD, message }]);
}

/** The file of a form that was read already; none and an empty one are told at its field. */
export async function fileOf(formData: FormData, mostBytes: number): Promise<SentFile> {
	const file = formData.get(FILE_FIELD);
	if (!(file instanceof File) || file.size === 0) throw fileMissing();
	if (file.size > mostBytes) throw fileTooLarge(mostBytes);
	return { name: file.name, bytes: new Uint8Array(await file.arrayBuffer()) };
}

/** The form around a file, read no further than the file's limit and a little more. */
export async function readFileForm(request: Request, mostBytes: number): Promise<FormData> {
	try {
		return await readFormData(request, mostBytes + FORM_AROUND_FILE_BYTES);
	} catch (error) {
		if (error instanceof AppError && error.code === 'too_large') throw fileTooLarge(mostBytes);
		throw error;
	}
}

/** The file of a request to the API: in a form, or as the body. */
export async function readSentFile(request: Request, name: string, mostBytes: number): Promise<SentFile> {
	const media = (request.headers.get('content-type') ?? '').split(';')[0]!.trim().toLowerCase();
	if (media === 'multipart/form-data') {
		return fileOf(await readFileForm(request, mostBytes), mostBytes);
	}
	if (!(FILE_MEDIA as readonly string[]).includes(media)) {
		const message = `Send the file as multipart/form-data in the field ${FILE_FIELD}, or as the body with content-type ${FILE_MEDIA.join(', ')}.`;
		throw new AppError('malformed_request', message);
	}
	return { name, bytes: await readBytes(request, mostBytes) };
}
