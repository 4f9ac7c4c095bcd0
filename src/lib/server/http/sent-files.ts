import { createHash, type Hash } from 'node:crypto';
import { open, rm, type FileHandle } from 'node:fs/promises';
import { AppError } from '../errors';
import { newIncomingPath } from '../storage';
import { sayBytes } from './body';
import { FILE_FIELD } from './file-upload';
import { boundaryOf, splitForm, type FormEvent } from './multipart';

const MOST_FIELD_BYTES = 64 * 1024;

/** A file that came in and waits on the disk; where it was too large, it was read past and is not there. */
export interface IncomingUpload {
	name: string;
	path: string;
	bytes: number;
	sha256: string;
	isTooLarge: boolean;
}

export interface SentForm {
	fields: Map<string, string>;
	files: IncomingUpload[];
}

export interface FormLimits {
	mostFileBytes: number;
	mostFiles: number;
	/** Of everything together. */
	mostBytes: number;
}

/** Pieces of a body, no further than the limit. Left unread beyond it, and not broken off: the answer must get out. */
async function* readPieces({ body, headers }: Request, limits: FormLimits): AsyncGenerator<Uint8Array> {
	const { mostBytes, mostFiles, mostFileBytes } = limits;
	const tooLarge = (): AppError => {
		const message =
			mostFiles === 1
				? `The file is larger than ${sayBytes(mostFileBytes)}, the most that is taken.`
				: `All files together are larger than ${sayBytes(mostBytes)}: send fewer at once.`;
		return new AppError('too_large', message, [{ path: FILE_FIELD, message }]);
	};
	if (Number(headers.get('content-length') ?? 0) > mostBytes) throw tooLarge();
	if (!body) return;
	const reader = body.getReader();
	let bytes = 0;
	try {
		for (let part = await reader.read(); !part.done; part = await reader.read()) {
			bytes += part.value.byteLength;
			if (bytes > mostBytes) throw tooLarge();
			yield part.value;
		}
	} finally {
		reader.releaseLock();
	}
}

/** Writes one file to the disk as it comes in; what is beyond the limit is passed over. */
class IncomingWriter {
	private readonly hash: Hash = createHash('sha256');
	private bytes = 0;

	private constructor(
		private readonly upload: Pick<IncomingUpload, 'name' | 'path'>,
		private readonly handle: FileHandle,
		private readonly mostBytes: number
	) {}

	static async open(name: string, path: string, mostBytes: number): Promise<IncomingWriter> {
		return new IncomingWriter({ name, path }, await open(path, 'wx', 0o600), mostBytes);
	}

	async write(piece: Uint8Array): Promise<void> {
		this.bytes += piece.byteLength;
		if (this.bytes > this.mostBytes) return;
		this.hash.update(piece);
		await this.handle.writeFile(piece);
	}

	async end(): Promise<IncomingUpload> {
		await this.handle.close();
		const isTooLarge = this.bytes > this.mostBytes;
		return { ...this.upload, bytes: this.bytes, sha256: this.hash.digest('hex'), isTooLarge };
	}
}

interface Taking {
	form: SentForm;
	limits: FormLimits;
	/** Every file that was begun, finished or not, for it has to be cleared away. */
	paths: string[];
}

async function beginFile({ form, limits, paths }: Taking, name: string): Promise<IncomingWriter> {
	const { mostFiles, mostFileBytes } = limits;
	if (form.files.length >= mostFiles) {
		const most = mostFiles === 1 ? 'One file is' : `${mostFiles} files are`;
		throw new AppError('too_large', `${most} the most that is taken at once.`);
	}
	const path = await newIncomingPath();
	paths.push(path);
	return IncomingWriter.open(name, path, mostFileBytes);
}

async function takeField(events: AsyncGenerator<FormEvent>): Promise<string> {
	const parts: Uint8Array[] = [];
	let bytes = 0;
	for (
		let next = await events.next();
		!next.done && next.value.kind === 'bytes';
		next = await events.next()
	) {
		bytes += next.value.bytes.byteLength;
		if (bytes > MOST_FIELD_BYTES) throw new AppError('too_large', 'A field of the form is too long.');
		// A copy: the piece that it is a part of is given up.
		parts.push(Buffer.from(next.value.bytes));
	}
	return Buffer.concat(parts).toString('utf8');
}

async function takeFile(events: AsyncGenerator<FormEvent>, taking: Taking, name: string): Promise<void> {
	const writer = await beginFile(taking, name);
	try {
		for (
			let next = await events.next();
			!next.done && next.value.kind === 'bytes';
			next = await events.next()
		) {
			await writer.write(next.value.bytes);
		}
	} finally {
		taking.form.files.push(await writer.end());
	}
}

async function takeForm(request: Request, boundary: string, taking: Taking): Promise<void> {
	const events = splitForm(readPieces(request, taking.limits), boundary);
	for (let next = await events.next(); !next.done; next = await events.next()) {
		if (next.value.kind !== 'begin') continue;
		const { field, fileName } = next.value;
		if (fileName === null) taking.form.fields.set(field, await takeField(events));
		else await takeFile(events, taking, fileName);
	}
	// A box for files in which none was chosen is sent as a file without a name.
	taking.form.files = taking.form.files.filter(({ name, bytes }) => name !== '' || bytes > 0);
}

async function takeBody(request: Request, name: string, taking: Taking): Promise<void> {
	const writer = await beginFile(taking, name);
	try {
		for await (const piece of readPieces(request, taking.limits)) await writer.write(piece);
	} finally {
		taking.form.files.push(await writer.end());
	}
}

async function take(request: Request, taking: Taking, body?: { media: readonly string[]; name: string }) {
	const contentType = request.headers.get('content-type') ?? '';
	const boundary = boundaryOf(contentType);
	if (boundary !== null) return takeForm(request, boundary, taking);
	const media = contentType.split(';')[0]!.trim().toLowerCase();
	if (body?.media.includes(media)) return takeBody(request, body.name, taking);
	const orBody = body ? `, or as the body with content-type ${body.media.join(', ')}` : '';
	throw new AppError(
		'malformed_request',
		`Send files as multipart/form-data in the field ${FILE_FIELD}${orBody}.`
	);
}

/** Reads a form with files, or a file that is the body, to the disk; after the work nothing of it is left there. */
export async function withSentFiles<T>(
	request: Request,
	limits: FormLimits,
	work: (form: SentForm) => Promise<T>,
	body?: { media: readonly string[]; name: string }
): Promise<T> {
	const taking: Taking = { form: { fields: new Map(), files: [] }, limits, paths: [] };
	try {
		await take(request, taking, body);
		return await work(taking.form);
	} finally {
		for (const path of taking.paths) await rm(path, { force: true });
	}
}
