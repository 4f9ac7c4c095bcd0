/** `air from radiator to bay` → `airFromRadiatorToBay`. */
export function toIdentifier(name: string): string {
	return name.replace(/[^a-zA-Z0-9]+(.)/g, (_, first: string) => first.toUpperCase());
}

/** A sum as it is written: `a - b + c`; `0` for nothing. */
export function writeSum(terms: readonly { sign: 1 | -1; text: string }[]): string {
	if (terms.length === 0) return '0';
	return terms
		.map(({ sign, text }, at) =>
			sign > 0 ? (at === 0 ? text : ` + ${text}`) : at === 0 ? `-${text}` : ` - ${text}`
		)
		.join('');
}

/** A number as it is written into code, to its last digit. */
export function writeNumber(value: number): string {
	return value < 0 ? `(${value})` : String(value);
}
