import { describe, expect, it } from 'vitest';
import { safeText } from './safe-csv';

describe('text in a cell of a table', () => {
	it.each(['=1+1', '+61 400', '-2 K', '@SUM(A1)', '\t=1', '\r=1'])('is kept from being run: %j', (text) => {
		expect(safeText(text)).toBe(`'${text}`);
	});

	it.each(['', 'Ilse Tarn', 'a=b', '3 − 4', '\u22123 K'])('is left alone otherwise: %j', (text) => {
		expect(safeText(text)).toBe(text);
	});
});
