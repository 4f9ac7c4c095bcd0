import { hashWords } from '../statistics';

/** Serial numbers and dates in a header are another for each file of the same logger. */
const LONG_DIGITS = /\d{5,}/g;
const SEPARATOR = 0x1f;

const toPlain = (name: string): string =>
	name.normalize('NFKC').toLowerCase().replace(LONG_DIGITS, '').replace(/\s+/g, ' ').trim();

const hashFrom = (seed: number, names: readonly string[]): string => {
	const words = names.flatMap((name) => [...Array.from(name, (sign) => sign.codePointAt(0)!), SEPARATOR]);
	return hashWords(seed, ...words)
		.toString(16)
		.padStart(8, '0');
};

/**
 * By what a logger that was seen before is known again: a hash of the names of its columns.
 *
 * @param header names of the columns, in order
 * @returns 16 hexadecimal digits; capitals, blanks and runs of five and more digits make no difference
 * Validity: two headers share a fingerprint by chance once in 2⁶⁴; loggers without a header are known by their number of columns.
 * Source: as hashWords, from two seeds.
 * @example
 * loggerFingerprint(['Time', 'Cell (°C) 1048576']) === loggerFingerprint(['time', 'cell  (°C)']); // true
 */
export function loggerFingerprint(header: readonly string[]): string {
	const names = header.map(toPlain);
	return hashFrom(1, names) + hashFrom(2, names);
}
