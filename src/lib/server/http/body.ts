import { AppError } from '../errors';

/** More than any form or scenario of ours comes to: a thousand legs with every field written out are a third of it. */
export const MOST_BODY_BYTES = 512 * 1024;

function tooLarge(mostBytes: number): AppError {
	return new AppError(
		'too_large',
		`The body is larger than ${Math.floor(mostBytes / 1024)} KiB, the most that is read here.`
	);
}

/** The text of a body, read no further than the limit, whatever its headers say or leave out. */
export async function readBody(request: Request, mostBytes = MOST_BODY_BYTES): Promise<string> {
	const announced = Number(request.headers.get('content-length') ?? 0);
	if (announced > mostBytes) throw tooLarge(mostBytes);
	if (!request.body) return '';
	const decoder = new TextDecoder();
	let text = '';
	let bytes = 0;
	const reader = request.body.getReader();
	for (let part = await reader.read(); !part.done; part = await reader.read()) {
		bytes += part.value.byteLength;
		if (bytes > mostBytes) {
			await reader.cancel();
			throw tooLarge(mostBytes);
		}
		text += decoder.decode(part.value, { stream: true });
	}
	return text + decoder.decode();
}
