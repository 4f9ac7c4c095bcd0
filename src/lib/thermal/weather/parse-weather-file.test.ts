import { describe, expect, it } from 'vitest';
import {
	makeCsv,
	makeCsvLines,
	makeDays,
	makeEpw,
	makeEpwLines,
	makeHours
} from '../../../../tests/support/weather-files';
import { parseWeatherFile } from './parse-weather-file';
import type { WeatherFile } from './weather-file';
import type { WeatherProblem } from './weather-problem';

const EPW_LINES = makeEpwLines();
const CSV_LINES = makeCsvLines();
/** 3 March 05:00 in the EPW file: 8 lines of header, then 61 days. */
const LINE = 8 + (31 + 28 + 2) * 24 + 5 + 1;

function read(text: string): WeatherFile {
	const parsed = parseWeatherFile(text);
	if (!parsed.ok) throw new Error(parsed.problems.map(({ message }) => message).join('\n'));
	return parsed.file;
}

function refuse(lines: readonly string[]): { problems: WeatherProblem[]; problemCount: number } {
	const parsed = parseWeatherFile(lines.join('\n'));
	if (parsed.ok) throw new Error('The file was taken.');
	return parsed;
}

/** The file with one line changed; lines count from 1. */
const change = (lines: readonly string[], line: number, to: (before: string) => string): string[] =>
	lines.map((each, index) => (index === line - 1 ? to(each) : each));

const setCell =
	(number: number, value: string) =>
	(line: string): string =>
		line
			.split(',')
			.map((cell, index) => (index === number - 1 ? value : cell))
			.join(',');

const epwWith = (number: number, value: string) => refuse(change(EPW_LINES, LINE, setCell(number, value)));
const csvWith = (number: number, value: string) =>
	refuse(change(CSV_LINES, LINE - 7, setCell(number, value)));

describe('a good weather file', () => {
	it('in EPW gives every hour in order, and where it was', () => {
		const { format, site, hours } = read(makeEpw());
		expect(format).toBe('epw');
		expect(site).toEqual({
			...{ name: 'Salt Lake, North, Nowhere', latitudeDeg: -28.5, longitudeDeg: 137.25, altitudeM: 121 }
		});
		expect(hours).toHaveLength(8_760);
		expect(hours[0]).toEqual({ line: 9, hourOfYear: 0, dryBulbC: 26, globalHorizontalWPerM2: 0 });
		const noon = hours[12];
		expect(noon).toMatchObject({ line: 21, hourOfYear: 12, globalHorizontalWPerM2: 901 });
		expect(noon?.dryBulbC).toBeCloseTo(21 + 0.7 * 14, 4);
	});

	it('in CSV gives the same hours, and says nothing of where', () => {
		const epw = read(makeEpw());
		const csv = read(makeCsv());
		expect([csv.format, csv.site]).toEqual(['csv', null]);
		const withoutLines = ({ hours }: WeatherFile) => hours.map(({ line: _line, ...hour }) => hour);
		expect(withoutLines(csv)).toEqual(withoutLines(epw));
	});

	it('in CSV may tell month, day and hour, in any order of columns, with others between', () => {
		const rows = makeHours(makeDays()).map(
			({ month, day, hour, dryBulbC }) => `"x",${hour},${dryBulbC.toFixed(4)},${day},${month}`
		);
		const { hours } = read(['note,Hour,DRY_BULB_C,day,month', ...rows].join('\n'));
		expect(hours).toHaveLength(8_760);
		expect(hours.every(({ globalHorizontalWPerM2 }) => globalHorizontalWPerM2 === null)).toBe(true);
		expect(hours[8_759]?.hourOfYear).toBe(366 * 24 - 1);
	});

	it('may have 29 February, a byte order mark, and its hours in another order', () => {
		const leapDay = { month: 2, day: 29, highestC: 30, lowestC: 20 };
		const hours = [...makeHours([leapDay]), ...makeHours(makeDays())];
		const { hours: read8784 } = read(`\uFEFF${makeCsv(hours)}`);
		expect(read8784.map(({ hourOfYear }) => hourOfYear)).toEqual(Array.from({ length: 8_784 }, (_, h) => h));
		expect(read8784[59 * 24 + 15]?.dryBulbC).toBe(30);
	});

	it('may not know the sun', () => {
		const lines = change(EPW_LINES, LINE, setCell(14, '9999'));
		expect(read(lines.join('\n')).hours[LINE - 9]?.globalHorizontalWPerM2).toBeNull();
	});

	it('may reach the ends of the temperatures, and no further', () => {
		const ends = change(change(EPW_LINES, LINE, setCell(7, '-90')), LINE + 1, setCell(7, '60.0'));
		expect(read(ends.join('\n')).hours.slice(LINE - 9, LINE - 7)).toMatchObject([
			{ dryBulbC: -90 },
			{ dryBulbC: 60 }
		]);
		expect(epwWith(7, '60.01').problems).toMatchObject([{ kind: 'outside-limits', value: '60.01' }]);
		expect(epwWith(7, '-90.01').problems).toMatchObject([{ kind: 'outside-limits', value: '-90.01' }]);
	});
});

describe('what is wrong with an EPW file is told by line and column', () => {
	it('a temperature that cannot be', () => {
		expect(epwWith(7, '75')).toEqual({
			ok: false,
			problemCount: 1,
			problems: [
				{
					kind: 'outside-limits',
					line: LINE,
					column: { number: 7, name: 'dry bulb' },
					value: '75',
					limit: 'a number within −90 to 60 °C',
					message: `Line ${LINE}, column 7 (dry bulb): found 75; needed: a number within −90 to 60 °C.`
				}
			]
		});
	});

	it.each([
		['text for a temperature', 7, 'warm', 'not-a-number', 'dry bulb'],
		['the mark of a temperature that is not known', 7, '99.9', 'missing-value', 'dry bulb'],
		['no temperature', 7, '', 'missing-value', 'dry bulb'],
		['text for the sun', 14, 'bright', 'not-a-number', 'global horizontal'],
		['a sun below nothing', 14, '-1', 'outside-limits', 'global horizontal'],
		['more sun than there is', 14, '1401', 'outside-limits', 'global horizontal'],
		['a month that is none', 2, '13', 'outside-limits', 'month'],
		['a day that its month has not', 3, '32', 'outside-limits', 'day'],
		['an hour of a clock that begins at 0', 4, '0', 'outside-limits', 'hour'],
		['half an hour', 4, '5.5', 'not-a-number', 'hour']
	])('%s', (_what, number, value, kind, name) => {
		const { problems, problemCount } = epwWith(number, value);
		expect(problemCount).toBe(1);
		expect(problems[0]).toMatchObject({ kind, line: LINE, column: { number, name }, value });
	});

	it('a row with a column too few or too many', () => {
		const short = refuse(change(EPW_LINES, LINE, (line) => line.slice(0, line.lastIndexOf(','))));
		const long = refuse(change(EPW_LINES, LINE, (line) => `${line},1`));
		expect(short.problems).toMatchObject([{ kind: 'wrong-columns', line: LINE, value: '34 columns' }]);
		expect(long.problems).toMatchObject([{ value: '36 columns', limit: '35 columns', column: null }]);
	});

	it('a header line that is another', () => {
		const { problems } = refuse(change(EPW_LINES, 4, () => 'SOIL,0'));
		expect(problems).toMatchObject([
			{ kind: 'wrong-header', line: 4, value: 'SOIL', limit: 'GROUND TEMPERATURES, as EPW line 4' }
		]);
		expect(refuse(change(EPW_LINES, 1, setCell(1, 'PLACE'))).problems).toMatchObject([
			{ kind: 'wrong-header', line: 1, column: { number: 1 } }
		]);
	});

	it('a latitude, an elevation and a count of rows an hour that cannot be', () => {
		const { problems } = refuse(
			change(
				change(EPW_LINES, 1, (line) => setCell(10, 'high')(setCell(7, '91')(line))),
				8,
				setCell(3, '4')
			)
		);
		expect(problems).toMatchObject([
			{ line: 1, column: { number: 7, name: 'latitude' }, value: '91' },
			{ line: 1, column: { number: 10, name: 'elevation' }, value: 'high' },
			{ line: 8, column: { number: 3, name: 'rows an hour' }, value: '4' }
		]);
	});
});

describe('what is wrong with a CSV file is told by line and column', () => {
	it.each([
		['text for a temperature', 2, 'warm', 'not-a-number', 'dry_bulb_c'],
		['a temperature that cannot be', 2, '-91', 'outside-limits', 'dry_bulb_c'],
		['no temperature', 2, '', 'missing-value', 'dry_bulb_c'],
		['a time of another form', 1, '3/3/2003 5:00', 'no-such-time', 'time'],
		['a time with a zone', 1, '2003-03-03T05:00Z', 'no-such-time', 'time'],
		['a month that is none', 1, '2003-13-03T05:00', 'no-such-time', 'time'],
		['a day that its month has not', 1, '2003-04-31T05:00', 'no-such-time', 'time'],
		['an hour of a clock that ends at 24', 1, '2003-03-03T24:00', 'no-such-time', 'time']
	])('%s', (_what, number, value, kind, name) => {
		const { problems, problemCount } = csvWith(number, value);
		expect(problemCount).toBe(1);
		expect(problems[0]).toMatchObject({ kind, line: LINE - 7, column: { number, name }, value });
	});

	it('a header without a time, without a temperature, or with a name twice', () => {
		const withHeader = (header: string) => refuse(change(CSV_LINES, 1, () => header)).problems;
		expect(withHeader('month,dry_bulb_c,x')).toMatchObject([
			{ kind: 'wrong-header', line: 1, limit: 'a header with time, or with month, day and hour' }
		]);
		expect(withHeader('time,t,x')).toMatchObject([
			{ kind: 'wrong-header', limit: 'a header with dry_bulb_c' }
		]);
		expect(withHeader('time,dry_bulb_c,time')).toMatchObject([
			{ kind: 'wrong-header', column: { number: 3, name: 'time' } }
		]);
	});

	it('a row with another number of columns than the header', () => {
		expect(refuse(change(CSV_LINES, 5, (line) => `${line},1`)).problems).toMatchObject([
			{ kind: 'wrong-columns', line: 5, value: '4 columns', limit: '3 columns, as the header has' }
		]);
	});

	it('a file of neither form', () => {
		expect(refuse(['Dear workshop,', 'it was hot.']).problems).toMatchObject([
			{ kind: 'wrong-header', line: 1, value: 'Dear workshop,' }
		]);
		expect(refuse(['']).problems).toMatchObject([{ kind: 'wrong-header', line: 1, value: '' }]);
	});
});

describe('the hours of a year', () => {
	it('that are missing are told where the next one stands', () => {
		const without = EPW_LINES.filter((_, index) => index !== LINE - 1 && index !== LINE);
		const { problems, problemCount } = refuse(without);
		expect(problemCount).toBe(2);
		expect(problems).toMatchObject([
			{ kind: 'too-few-hours', line: null, value: '8758 hourly rows' },
			{ kind: 'missing-hours', line: LINE, value: 'no rows for 2 hours from 3 March 05:00' }
		]);
	});

	it('that are missing at the end have no line', () => {
		expect(refuse(EPW_LINES.slice(0, -1)).problems[1]).toMatchObject({
			...{ kind: 'missing-hours', line: null, value: 'no row for 31 December 23:00' }
		});
	});

	it('that stand twice are told with both lines', () => {
		const { problems, problemCount } = refuse([...CSV_LINES, CSV_LINES[1]!]);
		expect(problemCount).toBe(1);
		expect(problems).toMatchObject([
			{
				...{ kind: 'repeated-hour', line: 8_762, value: '1 January 00:00' },
				limit: 'each hour once, and line 2 has it already'
			}
		]);
	});

	it('may not hold a part of 29 February', () => {
		const leapDay = makeHours([{ month: 2, day: 29, highestC: 30, lowestC: 20 }]).slice(0, 23);
		const { problems } = refuse(makeCsvLines([...makeHours(makeDays()), ...leapDay]));
		expect(problems).toMatchObject([{ kind: 'missing-hours', value: 'no row for 29 February 23:00' }]);
	});

	it('are 9,000 rows at most', () => {
		const more = Array.from({ length: 241 }, () => CSV_LINES[1]!);
		expect(refuse([...CSV_LINES, ...more]).problems).toMatchObject([
			{ kind: 'too-many-hours', line: null, value: '9001 hourly rows' }
		]);
	});
});

describe('a long list of problems', () => {
	it('is told to its twentieth, and counted', () => {
		const wrong = CSV_LINES.map((line, index) => (index >= 1 && index <= 33 ? setCell(2, 'x')(line) : line));
		const { problems, problemCount } = refuse(wrong);
		expect([problems.length, problemCount]).toEqual([20, 33]);
		expect(problems[19]?.line).toBe(21);
	});

	it('shows a dot for what does not show', () => {
		expect(refuse(['PK\u0003\u0004\u0000']).problems[0]?.value).toBe('PK···');
	});

	it('cuts a long value short', () => {
		expect(epwWith(7, 'y'.repeat(90)).problems[0]?.value).toBe(`${'y'.repeat(40)}…`);
	});
});

it('a file of more than 5 MB is not read', () => {
	const parsed = parseWeatherFile('x'.repeat(5 * 1024 * 1024 + 1));
	expect(parsed).toMatchObject({ ok: false, problemCount: 1, problems: [{ kind: 'too-large', line: null }] });
	expect(parseWeatherFile('x'.repeat(5 * 1024 * 1024))).toMatchObject({
		problems: [{ kind: 'wrong-header' }]
	});
});
