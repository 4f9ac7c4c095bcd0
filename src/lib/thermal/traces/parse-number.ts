/** Bytes that cells are made of (ISO 646). */
export const BYTE = {
	tab: 9,
	lineFeed: 10,
	carriageReturn: 13,
	space: 32,
	quote: 34,
	plus: 43,
	comma: 44,
	minus: 45,
	point: 46,
	slash: 47,
	zero: 48,
	nine: 57,
	colon: 58
} as const;

const EXACT_DIGITS = 15;
const POWERS_OF_TEN = Array.from({ length: 23 }, (_, power) => Number(`1e${power}`));
/** U+2212, the minus sign of typesetters, in UTF-8. */
const TYPED_MINUS = [0xe2, 0x88, 0x92] as const;

export const isDigit = (byte: number): boolean => byte >= BYTE.zero && byte <= BYTE.nine;
export const isBlank = (byte: number): boolean => byte === BYTE.space || byte === BYTE.tab;

/** A cell as text, for words and for what is told; every byte a character, as in ISO 8859-1. */
export function textOf(bytes: Uint8Array, from: number, to: number): string {
	let text = '';
	for (let at = from; at < to; at++) text += String.fromCharCode(bytes[at]!);
	return text;
}

const LONG_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** The few numbers with many digits or an exponent. */
function parseLong(bytes: Uint8Array, from: number, to: number, decimal: number): number {
	const text = textOf(bytes, from, to).replace(String.fromCharCode(decimal), '.');
	return LONG_NUMBER.test(text) ? Number(text) : NaN;
}

function signLength(bytes: Uint8Array, from: number): number {
	const first = bytes[from];
	if (first === BYTE.plus || first === BYTE.minus) return 1;
	return TYPED_MINUS.every((byte, at) => bytes[from + at] === byte) ? TYPED_MINUS.length : 0;
}

/**
 * The number that some bytes of a text write, without making a string of them.
 *
 *     value = ± digits / 10^decimals
 *
 * @param bytes text in UTF-8 or any other code that holds ISO 646
 * @param from where the number begins
 * @param to where it ends, not included
 * @param decimal the byte of the decimal sign: 46 for a point, 44 for a comma
 * @returns the nearest double; NaN where something else is written, or nothing
 * Validity: up to 15 digits without an exponent directly, everything else as the language reads it. No separators of thousands.
 * Source: up to 2⁵³ over up to 10²² is correctly rounded: Clinger, How to read floating point numbers accurately (PLDI 1990).
 * @example
 * parseNumber(Uint8Array.from([45, 50, 44, 53]), 0, 4, 44); // -2.5
 */
export function parseNumber(bytes: Uint8Array, from: number, to: number, decimal: number): number {
	const first = bytes[from]!;
	const signed = first >= BYTE.zero && first <= BYTE.nine ? 0 : signLength(bytes, from);
	let value = 0;
	let digits = 0;
	let pointAt = -1;
	let at = from + signed;
	for (; at < to; at++) {
		const byte = bytes[at]!;
		if (byte >= BYTE.zero && byte <= BYTE.nine) {
			value = value * 10 + (byte - BYTE.zero);
			digits++;
		} else if (byte === decimal && pointAt < 0) pointAt = at;
		else break;
	}
	if (digits === 0) return NaN;
	const negative = signed > 0 && first !== BYTE.plus;
	if (at < to || digits > EXACT_DIGITS) {
		const size = parseLong(bytes, from + signed, to, decimal);
		return isDigit(bytes[from + signed]!) || bytes[from + signed] === decimal
			? negative
				? -size
				: size
			: NaN;
	}
	if (pointAt >= 0) value /= POWERS_OF_TEN[to - pointAt - 1]!;
	return negative ? -value : value;
}
