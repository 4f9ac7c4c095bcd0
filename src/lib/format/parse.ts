const DECIMAL = /^[+-]?(\d+(\.\d*)?|\.\d+)$/;

/**
 * The number that a person wrote: "45,2", "45.2", "−5", " 1 200 ". One comma or one point is the decimal mark;
 * spaces part thousands. Null when it is not one plain number.
 */
export function parseDecimal(text: string): number | null {
	const plain = text
		.trim()
		.replace(/[\u2212\u2013\uFE63\uFF0D]/g, '-')
		.replace(/(?<=\d)[ \u00A0\u2009\u202F](?=\d{3}(?!\d))/g, '')
		.replace(',', '.');
	return DECIMAL.test(plain) ? Number(plain) : null;
}
