/*
 * Advance widths in hundredths of the type size, Roboto Flex at width 92, tabular figures;
 * measured in the browser from the font that the application ships. The server has no fonts to ask.
 */
const REGULAR: Record<string, string> = {
	'12': '\u202F',
	'18': '/',
	'24': ' ijl',
	'26': 'I',
	'28': '.,',
	'29': ':;',
	'30': 'f',
	'31': 't',
	'34': 'r-()',
	'37': '°',
	'45': 'vy',
	'47': 'xz',
	'49': 's',
	'50': 'k−',
	'51': 'c',
	'52': 'e',
	'53': 'aJL',
	'55': 'hnu',
	'56': '0123456789bdgopqEF',
	'58': 'PST',
	'61': 'ABKRVYXZ',
	'66': 'CDU',
	'70': 'GHNOQ',
	'74': 'w',
	'86': 'mMW'
};

const WIDTHS = new Map(
	Object.entries(REGULAR).flatMap(([width, letters]) =>
		[...letters].map((letter) => [letter, Number(width) / 100])
	)
);
const UNKNOWN_LETTER = 0.7;
/** The bold cut runs a little wider. */
const BOLD_FACTOR = 1.05;

/** How wide a line of text will be, px; for placing labels where nothing can be measured. */
export function estimateTextWidth(text: string, fontPx: number, bold = false): number {
	const ems = [...text].reduce((sum, letter) => sum + (WIDTHS.get(letter) ?? UNKNOWN_LETTER), 0);
	return ems * fontPx * (bold ? BOLD_FACTOR : 1);
}
