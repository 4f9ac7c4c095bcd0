import { AppError } from '../errors';

/** More than any scenario of ours comes to: a thousand legs with every field written out are a third of it. */
export const MOST_BODY_BYTES = 512 * 1024;
/** A form writes the name of every box out: the same thousand legs are within it. */
export const MOST_FORM_BYTES = 2 * 1024 * 1024;

export function sayBytes(bytes: number): string {
	const [size, unit] = bytes < 1024 * 1024 ? [bytes / 1024, 'KiB'] : [bytes / 1024 / 1024, 'MiB'];
	return `${Math.floor(size)} ${unit}`;
}

function tooLarge(mostBytes: number): AppError {
	return new AppError(
		'too_large',
		`The body is larger than ${sayBytes(mostBytes)}, the most that is read here.`
	);
}

/** A body, read no further than the limit, whatever its headers say or leave out. */
export async function readBytes(request: Request, mostBytes: number): Promise<Uint8Array<ArrayBuffer>> {
	const announced = Number(request.headers.get('content-length') ?? 0);
	if (announced > mostBytes) throw tooLarge(mostBytes);
	if (!request.body) return new Uint8Array();
	const parts: Uint8Array[] = [];
	let bytes = 0;
	const reader = request.body.getReader();
	for (let part = await reader.read(); !part.done; part = await reader.read()) {
		bytes += part.value.byteLength;
		if (bytes > mostBytes) {
			// Left unread and not broken off: to cancel it would close the connection before the answer is out.
			reader.releaseLock();
			throw tooLarge(mostBytes);
		}
		parts.push(part.value);
	}
	return joinParts(parts, bytes);
}

function joinParts(parts: readonly Uint8Array[], bytes: number): Uint8Array<ArrayBuffer> {
	const whole = new Uint8Array(bytes);
	let at = 0;
	for (const part of parts) {
		whole.set(part, at);
		at += part.byteLength;
	}
	return whole;
}

/** The text of a body. */
export async function readBody(request: Request, mostBytes = MOST_BODY_BYTES): Promise<string> {
	return new TextDecoder().decode(await readBytes(request, mostBytes));
}

/** The fields of a form, and its files. */
export async function readFormData(request: Request, mostBytes = MOST_FORM_BYTES): Promise<FormData> {
	const body = await readBytes(request, mostBytes);
	const headers = { 'content-type': request.headers.get('content-type') ?? '' };
	try {
		return await new Response(body, { headers }).formData();
	} catch {
		throw new AppError('malformed_request', 'The body is not a form.');
	}
}
