import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { toBytes } from '../../../../tests/support/trace-files';
import { daysOfMonth, daysSince1970 } from './civil';
import { ClockCell } from './clock-cell';
import { DateCell } from './date-cell';
import { parseNumber } from './parse-number';

const numberOf = (text: string, decimal = '.'): number =>
	parseNumber(toBytes(`9${text}9`), 1, 1 + toBytes(text).length, decimal.charCodeAt(0));

describe('a number in a cell', () => {
	const sign = fc.constantFrom('', '-', '+');
	const digits = (maxLength: number) => fc.stringMatching(new RegExp(`^[0-9]{1,${maxLength}}$`));
	const exponent = fc.oneof(
		fc.constant(''),
		fc.integer({ min: -30, max: 30 }).map((power) => `e${power}`)
	);

	it('is the one that the language reads, to the last bit', () => {
		const parts = fc.tuple(sign, digits(12), fc.oneof(fc.constant(''), digits(12)), exponent);
		fc.assert(
			fc.property(parts, ([minus, whole, fraction, power]) => {
				const text = `${minus}${whole}${fraction === '' ? '' : `.${fraction}`}${power}`;
				expect(numberOf(text)).toBe(Number(text));
				expect(numberOf(text.replace('.', ','), ',')).toBe(Number(text));
			}),
			{ numRuns: 2000, seed: 2 }
		);
	});

	it.each([
		['.5', 0.5],
		['5.', 5],
		['−3.5', -3.5],
		['123456789012345678901234567890', 1.2345678901234568e29]
	])('may be %s', (text, value) => {
		expect(numberOf(text)).toBe(value);
	});

	it.each(['', '-', '.', '1.2.3', '1,2', '1 2', '0x10', '1e', '--1', '+-1', 'Infinity', '12V', '∞'])(
		'is not %j',
		(text) => {
			expect(numberOf(text)).toBeNaN();
		}
	);
});

describe('the calendar', () => {
	it('is that of the language for every day from 1970 to 2199', () => {
		const wrong: string[] = [];
		for (let year = 1970; year < 2200; year++) {
			for (let month = 1; month <= 12; month++) {
				const last = new Date(Date.UTC(year, month, 0)).getUTCDate();
				const first = Date.UTC(year, month - 1, 1) / 86_400_000;
				const agrees = daysOfMonth(year, month) === last && daysSince1970(year, month, 1) === first;
				if (!agrees || daysSince1970(year, month, last) !== first + last - 1) wrong.push(`${year}-${month}`);
			}
		}
		expect(wrong).toEqual([]);
	});
});

describe('a date in a cell', () => {
	const daysOf = (text: string, order: 'ymd' | 'dmy' | 'mdy'): number => {
		const bytes = toBytes(text);
		const date = new DateCell(order);
		return date.read(bytes, 0, bytes.length) && date.end === bytes.length ? date.days : NaN;
	};
	const day = daysSince1970(2024, 2, 29);

	it.each([
		['2024-02-29', 'ymd'],
		['20240229', 'ymd'],
		['24/2/29', 'ymd'],
		['29.02.2024', 'dmy'],
		['29. 2. 24', 'dmy'],
		['29-FEB-2024', 'dmy'],
		['29 February 2024', 'dmy'],
		['2/29/24', 'mdy'],
		['Feb 29, 2024', 'mdy']
	] as const)('may be %s', (text, order) => {
		expect(daysOf(text, order)).toBe(day);
	});

	it.each([
		['29.02.2023', 'dmy'],
		['0.2.2024', 'dmy'],
		['29.13.2024', 'dmy'],
		['29.02.024', 'dmy'],
		['29.02', 'dmy'],
		['29 Nox 2024', 'dmy'],
		['1969-12-31', 'ymd'],
		['2200-01-01', 'ymd'],
		['2024-02-29x', 'ymd']
	] as const)('is not %s', (text, order) => {
		expect(daysOf(text, order)).toBeNaN();
	});
});

describe('a time of day in a cell', () => {
	const clock = new ClockCell();
	const read = (text: string): [number, number] | null => {
		const bytes = toBytes(text);
		return clock.read(bytes, 0, bytes.length) ? [clock.secondOfDay, clock.offsetS] : null;
	};

	it.each([
		['14:30', 52_200, NaN],
		['4:30', 16_200, NaN],
		['14:30:15.25', 52_215.25, NaN],
		['14:30:15,25', 52_215.25, NaN],
		['143015', 52_215, NaN],
		['1430', 52_200, NaN],
		['24:00:00', 86_400, NaN],
		['12:00 AM', 0, NaN],
		['12:00 PM', 43_200, NaN],
		['1:05pm', 47_100, NaN],
		['14:30Z', 52_200, 0],
		['14:30 UTC', 52_200, 0],
		['14:30:00+09:30', 52_200, 34_200],
		['14:30:00-0330', 52_200, -12_600],
		['14:30:00 -05', 52_200, -18_000]
	])('may be %s', (text, secondOfDay, offsetS) => {
		expect(read(text)).toEqual([secondOfDay, offsetS]);
	});

	it.each([
		'',
		'14',
		'14:',
		'14:60',
		'14:3',
		'24:00:01',
		'13:00 PM',
		'0:30 AM',
		'14:30+15',
		'14:30 noon',
		'14:30:15.',
		'14:30Zulu'
	])('is not %j', (text) => {
		expect(read(text)).toBeNull();
	});
});
