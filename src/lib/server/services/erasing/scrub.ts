import { ERASED } from '$lib/schemas/erasures';

const escape = (text: string): string => text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');

/** Whole words only: "Ida" is not in "Idaho". The longest first, so that no part of one is left. */
function anyOf(words: readonly string[], flags: string): RegExp | null {
	const longestFirst = [...new Set(words)].sort((a, b) => b.length - a.length).map(escape);
	if (longestFirst.length === 0) return null;
	return new RegExp(`(?<![\\p{L}\\p{N}])(?:${longestFirst.join('|')})(?![\\p{L}\\p{N}])`, flags);
}

const FEWEST_LETTERS = 3;

/** What takes a person out of texts. */
export interface Scrubber {
	/** Names, addresses and numbers as they are known. */
	text: (text: string) => string;
	/** In what people write freely, the parts of a name too: "Mr Tarn wants it there". */
	free: (text: string) => string;
	/** The same as `text` for every text within a value. */
	json: <T>(value: T) => T;
	/** The same as `free` for every text within a value. */
	freeJson: <T>(value: T) => T;
}

function mapTexts(value: unknown, change: (text: string) => string): unknown {
	if (typeof value === 'string') return change(value);
	if (Array.isArray(value)) return value.map((each) => mapTexts(each, change));
	if (value === null || typeof value !== 'object') return value;
	return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, mapTexts(inner, change)]));
}

/** Of the names the parts are looked for as well, as they are written, in what people write freely. */
export function makeScrubber(terms: readonly string[], names: readonly string[]): Scrubber {
	const known = terms.filter((term) => term.trim().length > 1);
	const parts = names.flatMap((name) => name.split(/\s+/)).filter((part) => part.length >= FEWEST_LETTERS);
	const [whole, partial] = [anyOf(known, 'giu'), anyOf(parts, 'gu')];
	const text = (given: string): string => (whole ? given.replace(whole, ERASED) : given);
	const free = (given: string): string => (partial ? text(given).replace(partial, ERASED) : text(given));
	return {
		...{ text, free },
		json: <T>(value: T) => mapTexts(value, text) as T,
		freeJson: <T>(value: T) => mapTexts(value, free) as T
	};
}
