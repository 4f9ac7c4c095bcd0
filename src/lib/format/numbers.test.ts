import { describe, expect, it } from 'vitest';
import * as numbers from './numbers';

const plain = (text: string): string => text.replace(/\u202F/g, ' ');

describe('formatNumber', () => {
	it('writes a true minus, and none before a zero', () => {
		expect(numbers.formatNumber(-3.16, 1)).toBe('−3.2');
		expect(numbers.formatNumber(-0.04, 1)).toBe('0.0');
	});
});

describe('formatMoney', () => {
	it.each([
		[75.5, '75.50'],
		[76, '76'],
		[0.05, '0.05'],
		[120.999, '121'],
		[1_200.25, '1200.25']
	])('says %s as "%s"', (amount, text) => {
		expect(numbers.formatMoney(amount)).toBe(text);
	});
});

describe('writeNumber', () => {
	it.each([
		[177.8, '177.8'],
		[-5, '−5'],
		[0.1 + 0.2, '0.3'],
		[1e-7, '0.0000001'],
		[1_200_000, '1200000']
	])('puts %s into a box as "%s"', (value, text) => {
		expect(numbers.writeNumber(value)).toBe(text);
	});
});

describe('figures with units', () => {
	it('part from their unit by a thin space that does not break', () => {
		expect(numbers.formatTemperature(80.4)).toBe('80\u202F°C');
	});

	it.each([
		[numbers.formatKelvinChange(13), '+13.0 K'],
		[numbers.formatKelvinChange(-10.94), '−10.9 K'],
		[numbers.formatKelvinChange(0.04), '0.0 K'],
		[numbers.formatAmpHours(31.2), '31 Ah'],
		[numbers.formatAmpHours(9.4), '9.4 Ah'],
		[numbers.formatAmps(40), '40 A'],
		[numbers.formatAmps(4.5), '4.5 A'],
		[numbers.formatWatts(3.24), '3.2 W'],
		[numbers.formatPercent(0.8), '80 %'],
		[numbers.formatMass(640), '640 kg'],
		[numbers.formatMass(2950), '3.0 t']
	])('%s', (text, expected) => {
		expect(plain(text)).toBe(expected);
	});
});
