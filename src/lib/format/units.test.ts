import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseDecimal } from './parse';
import { convertUnit, parseMeasure } from './units';

describe('parseDecimal', () => {
	it.each([
		['45,2', 45.2],
		['45.2', 45.2],
		['−5', -5],
		['–5', -5],
		['+5', 5],
		[' 1 200 ', 1200],
		['1\u202F200', 1200],
		['.5', 0.5],
		['7.', 7]
	])('reads "%s"', (text, value) => {
		expect(parseDecimal(text)).toBe(value);
	});

	it.each(['', ' ', '-', '1.2.3', '1,200.5', '1e5', '0x10', 'seven', '12 34', 'Infinity', 'NaN'])(
		'refuses "%s"',
		(text) => {
			expect(parseDecimal(text)).toBeNull();
		}
	);
});

describe('parseMeasure', () => {
	it.each([
		['180', 'mm', 180],
		['180 mm', 'mm', 180],
		['7 in', 'mm', 177.8],
		['7"', 'mm', 177.8],
		['18 cm', 'mm', 180],
		['1 ft', 'mm', 304.8],
		['104 °F', '°C', 40],
		['40c', '°C', 40],
		['2,9 t', 'kg', 2900],
		['60 mph', 'km/h', 96.56064],
		['1.5 h', 'min', 90],
		['50 A', 'A', 50],
		['12 %', '%', 12],
		['15 K', 'K', 15]
	] as const)('reads "%s" for %s', (text, unit, value) => {
		expect(parseMeasure(text, unit)).toBeCloseTo(value, 9);
	});

	it.each([
		['20 kg', 'mm'],
		['20 furlongs', 'mm'],
		['27 °F', 'K'],
		['50 Ah', 'A'],
		['mm', 'mm'],
		['5 ft 3 in', 'mm']
	] as const)('refuses "%s" for %s', (text, unit) => {
		expect(parseMeasure(text, unit)).toBeNull();
	});

	it('knows the inch and the fixed points of the Fahrenheit scale', () => {
		// The inch is 25.4 mm exactly (international yard and pound agreement, 1959).
		expect(convertUnit(1, 'in', 'mm')).toBeCloseTo(25.4, 12);
		// NIST SP 811, B.8: t/°C = (t/°F − 32)/1.8.
		expect(convertUnit(32, '°F', '°C')).toBeCloseTo(0, 9);
		expect(convertUnit(212, '°F', '°C')).toBeCloseTo(100, 9);
		expect(convertUnit(-40, '°F', '°C')).toBeCloseTo(-40, 9);
	});

	it('never throws, whatever is typed', () => {
		fc.assert(
			fc.property(fc.string(), (text) => {
				const value = parseMeasure(text, 'mm');
				expect(value === null || Number.isFinite(value)).toBe(true);
			})
		);
	});
});
