/** How the characters of a file are written as bytes. */
export const TEXT_CODES = ['utf-8', 'utf-16le', 'utf-16be'] as const;
export type TextCode = (typeof TEXT_CODES)[number];

/** So many bytes tell how the text is written. */
export const BYTES_TO_TELL = 4;

/** The first bytes of each code (the byte order mark of Unicode), and how long they are. */
const MARKS: readonly { code: TextCode; bytes: readonly number[] }[] = [
	{ code: 'utf-8', bytes: [0xef, 0xbb, 0xbf] },
	{ code: 'utf-16le', bytes: [0xff, 0xfe] },
	{ code: 'utf-16be', bytes: [0xfe, 0xff] }
];

const standsAt = (bytes: Uint8Array, zeros: readonly number[], others: readonly number[]): boolean =>
	bytes.length >= BYTES_TO_TELL &&
	zeros.every((at) => bytes[at] === 0) &&
	others.every((at) => bytes[at] !== 0);

/**
 * How a text is written, from its first four bytes: by its byte order mark, or because every other byte is zero.
 *
 * @param bytes the first bytes of a file
 * @returns the code and the length of its mark in bytes; UTF-8 where nothing speaks against it, which also takes Windows-1252
 *   and every other code whose digits and delimiters are those of ISO 646
 * Validity: UTF-16 without a mark is known when the text begins with two characters of ISO 646.
 * Source: The Unicode Standard 15.0, section 23.8 (byte order mark); the Encoding Standard (WHATWG) for the names.
 * @example
 * findTextCode(Uint8Array.from([255, 254, 84, 0])); // { code: 'utf-16le', markLength: 2 }
 */
export function findTextCode(bytes: Uint8Array): { code: TextCode; markLength: number } {
	const mark = MARKS.find((each) => each.bytes.every((byte, at) => bytes[at] === byte));
	if (mark) return { code: mark.code, markLength: mark.bytes.length };
	if (standsAt(bytes, [1, 3], [0, 2])) return { code: 'utf-16le', markLength: 0 };
	if (standsAt(bytes, [0, 2], [1, 3])) return { code: 'utf-16be', markLength: 0 };
	return { code: 'utf-8', markLength: 0 };
}

/** Takes the bytes of a file in any pieces and gives them on as text in which digits and delimiters are single bytes. */
export class TextSource {
	private held = new Uint8Array(0);
	private decoder: TextDecoder | null = null;
	private isTold = false;

	push(bytes: Uint8Array): Uint8Array {
		if (this.isTold) return this.pass(bytes);
		const all = joinBytes(this.held, bytes);
		if (all.length < BYTES_TO_TELL) {
			this.held = all;
			return new Uint8Array(0);
		}
		return this.begin(all);
	}

	/** What was still held back when the file ends. */
	finish(): Uint8Array {
		if (!this.isTold) return this.begin(this.held);
		return this.decoder === null ? new Uint8Array(0) : new TextEncoder().encode(this.decoder.decode());
	}

	private begin(bytes: Uint8Array): Uint8Array {
		const { code, markLength } = findTextCode(bytes);
		this.isTold = true;
		if (code !== 'utf-8') this.decoder = new TextDecoder(code);
		return this.pass(bytes.subarray(markLength));
	}

	private pass(bytes: Uint8Array): Uint8Array {
		if (this.decoder === null) return bytes;
		return new TextEncoder().encode(this.decoder.decode(bytes, { stream: true }));
	}
}

/** The two one after the other; the second itself where the first is empty. */
export function joinBytes(first: Uint8Array, second: Uint8Array): Uint8Array<ArrayBuffer> {
	const all = new Uint8Array(first.length + second.length);
	all.set(first);
	all.set(second, first.length);
	return all;
}

/**
 * The text of the first bytes of a file, for finding out what it is.
 *
 * @param bytes the first bytes of a file; may end in the middle of a character
 * @returns its text without a byte order mark; bytes that are no UTF-8 are read as Windows-1252
 * Validity: files that begin in one of UTF-8, UTF-16 or Windows-1252.
 * Source: Encoding Standard (WHATWG), decoders utf-8, utf-16le, utf-16be and windows-1252.
 * @example
 * decodeSample(Uint8Array.from([176, 67])); // '°C'
 */
export function decodeSample(bytes: Uint8Array): string {
	const { code, markLength } = findTextCode(bytes);
	const body = bytes.subarray(markLength);
	try {
		return new TextDecoder(code, { fatal: true }).decode(body, { stream: true });
	} catch {
		return new TextDecoder('windows-1252').decode(body);
	}
}
