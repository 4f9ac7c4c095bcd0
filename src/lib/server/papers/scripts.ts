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

export interface Run {
	text: string;
	script: Script;
}

/** A text in runs of one part each, as a browser does it; what no part holds stays with the usual one. */
export function splitByScript(text: string): Run[] {
	const runs: Run[] = [];
	for (const character of text) {
		const script = scriptOf(character) ?? 'latin';
		const last = runs.at(-1);
		if (last?.script === script) last.text += character;
		else runs.push({ text: character, script });
	}
	return runs;
}

/** Browsers take a narrow space from another typeface; ours has the usual one only. */
export const widenSpaces = (text: string): string => text.replaceAll('\u202f', '\u00a0');
