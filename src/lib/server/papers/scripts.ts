import ranges from '@fontsource-variable/roboto-flex/unicode.json';

/** The parts in which the typeface ships, the usual one first. */
export const SCRIPTS = ['latin', 'latin-ext', 'vietnamese', 'greek', 'cyrillic', 'cyrillic-ext'] as const;
export type Script = (typeof SCRIPTS)[number];

/** What a part holds, code point by code point, as pairs of first and last. */
const COVERAGE = SCRIPTS.map((script) => ({ script, spans: readRanges(ranges[script]) }));

/** "U+0000-00FF,U+0131" → [[0, 255], [305, 305]]. */
export function readRanges(text: string): [number, number][] {
	return text.split(',').map((range) => {
		const [first, last] = range
			.trim()
			.replace(/^U\+/, '')
			.split('-')
			.map((hex) => Number.parseInt(hex, 16));
		return [first!, last ?? first!];
	});
}

/** Every character of a part, for cutting a font. */
export function charactersOf(script: Script): string {
	return readRanges(ranges[script])
		.flatMap(([first, last]) => Array.from({ length: last - first + 1 }, (_, index) => first + index))
		.filter((code) => code < 0xd800 || code > 0xdfff)
		.map((code) => String.fromCodePoint(code))
		.join('');
}

/** The part that holds a character; null where the typeface has none for it. */
export function scriptOf(character: string): Script | null {
	const code = character.codePointAt(0)!;
	const holds = ({ spans }: (typeof COVERAGE)[number]) =>
		spans.some(([first, last]) => code >= first && code <= last);
	return COVERAGE.find(holds)?.script ?? null;
}

/** Stands for a letter that the typeface does not have: seen and spoken of, where nothing at all would mislead. */
export const MISSING_LETTER = '?';

/** Marks that are no letters: they join, turn or colour what stands before them. */
const SILENT = /[\p{Cf}\u{fe00}-\u{fe0f}]/u;

export interface Run {
	text: string;
	script: Script;
}

export interface Split {
	runs: Run[];
	/** Whether a letter had to be left out for want of its shape. */
	lacks: boolean;
}

/** A text in runs of one part each, as a browser does it; what no part holds is shown to be missing. */
export function splitByScript(text: string): Split {
	const runs: Run[] = [];
	let lacks = false;
	for (const given of text.normalize('NFC')) {
		const known = scriptOf(given);
		if (known === null && SILENT.test(given)) continue;
		if (known === null) lacks = true;
		const [script, character] = known ? [known, given] : (['latin', MISSING_LETTER] as const);
		const last = runs.at(-1);
		if (last?.script === script) last.text += character;
		else runs.push({ text: character, script });
	}
	return { runs, lacks };
}

/**
 * What browsers take from another typeface and ours has no shape for: the usual space for the narrow one, and in words
 * what formulas have as signs.
 */
const SPELT: Readonly<Record<string, string>> = {
	'\u202f': '\u00a0',
	'√': 'root of ',
	'≤': 'at most',
	'⅓': '1/3'
};
const TO_SPELL = new RegExp(`[${Object.keys(SPELT).join('')}]`, 'g');

export const spellOut = (text: string): string => text.replace(TO_SPELL, (sign) => SPELT[sign]!);
