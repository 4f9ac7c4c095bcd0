import { describe, expect, it } from 'vitest';
import { readText, refusalOf, toBytes } from '../../../../tests/support/trace-files';
import { describeTrace } from './describe-trace';
import { findChannel } from './find-channels';
import { loggerFingerprint } from './fingerprint';
import { checkMapping, type TraceMapping } from './mapping';
import { clockHourAt } from './plan-from-legs';

const look = (lines: readonly string[], timeZone?: string) =>
	describeTrace(toBytes(lines.join('\n')), timeZone);
const dates = (cells: readonly string[]) =>
	look(['when,cell', ...cells.map((cell, at) => `${cell} 10:0${at}:00,20.${at}`)]);

describe('a file that was never seen', () => {
	const proposal = look(
		[
			'Unit;bay logger',
			'Serial;200417',
			'',
			'Date;Clock;Outside;Under-bonnet;Heat shield;Case;Cell 1;BMS board;Current;GPS speed;Cell voltage',
			'dd.mm.yyyy;hh:mm:ss;°C;°C;°F;°C;°C;°C;mA;mph;V',
			'31.01.2026;14:00:00;38,5;71,2;180,5;44;41;46,1;12000;51,5;3,31',
			'31.01.2026;14:00:01;38,5;;180,6;44;41;46,1;12010;51,5;3,31',
			'31.01.2026;14:00:02;38,5;71,4;180,9;44;41;46,1;11950;51,4;3,3',
			'31.01.2026;14:00:0'
		],
		'Australia/Darwin'
	);

	it('is told by delimiter, decimal sign, header and first row', () => {
		expect(proposal).toMatchObject({ delimiter: ';', decimal: ',', headerLine: 4, firstRowLine: 6 });
	});

	it('has a channel and a unit for each name that is known, and a few values of each', () => {
		expect(proposal.mapping.columns).toEqual([
			{ column: 3, channel: 'ambientC', unit: '°C' },
			{ column: 4, channel: 'bayAirC', unit: '°C' },
			{ column: 5, channel: 'exhaustShieldC', unit: '°F' },
			{ column: 6, channel: 'caseC', unit: '°C' },
			{ column: 7, channel: 'cellC', unit: '°C' },
			{ column: 8, channel: 'boardC', unit: '°C' },
			{ column: 9, channel: 'currentA', unit: 'mA' },
			{ column: 10, channel: 'speedKmh', unit: 'mph' }
		]);
		expect(proposal.columns[10]).toMatchObject({ name: 'Cell voltage V', channel: null });
		expect(proposal.columns[3]!.samples).toEqual(['71,2', '71,4']);
	});

	it('has its time in two columns, and says what it does not know', () => {
		const places = { column: 1, clockColumn: 2, order: 'dmy', timeZone: 'Australia/Darwin' };
		expect(proposal.time).toMatchObject({
			mapping: { kind: 'calendar', ...places },
			ambiguous: false,
			needsZone: true
		});
		expect(proposal.notes).toEqual([]);
		expect(proposal.time.needsZone).toBe(true);
	});

	it('gives a mapping that can be remembered as JSON', () => {
		const remembered = JSON.parse(JSON.stringify(proposal.mapping)) as typeof proposal.mapping;
		expect(remembered).toEqual(proposal.mapping);
		expect(() => checkMapping(remembered)).not.toThrow();
	});
});

describe('the header', () => {
	it('may stand in a comment', () => {
		const { headerLine, columns } = look(['# made here', '# time s,ambient', '0,20', '1,20']);
		expect([headerLine, columns[0]!.name, columns[1]!.channel]).toEqual([2, 'time s', 'ambientC']);
	});

	it('may be missing: columns have numbers then, and nothing is recognised', () => {
		const { headerLine, firstRowLine, columns, mapping, notes } = look(['0,20', '1,20.5', '2,21']);
		expect([headerLine, firstRowLine, columns[1]!.name, mapping.columns]).toEqual([null, 1, 'column 2', []]);
		expect(notes).toContain('No name of a column was recognised.');
	});

	it('of a file cut in the middle of a row is found all the same', () => {
		expect(look(['s,cell', '0,20', '1,20', '2,20', '3,2', '4']).mapping.columns).toHaveLength(1);
	});
});

describe('names of columns', () => {
	it.each([
		['Ambient temperature (°C)', 'ambientC', '°C', true],
		['amb', 'ambientC', '°C', false],
		['T_amb', 'ambientC', '°C', false],
		['t_ambient', 'ambientC', '°C', false],
		['Tamb [°C]', 'ambientC', '°C', true],
		['ambTemp_F', 'ambientC', '°F', true],
		['AMB_1', 'ambientC', '°C', false],
		['lamb', null, null, false],
		['chamber', null, null, false],
		['Bay_Air_degF', 'bayAirC', '°F', true],
		['underBonnetTemp', 'bayAirC', '°C', false],
		['Exhaust shield [Â°C]', 'exhaustShieldC', '°C', true],
		['battery case C', 'caseC', '°C', true],
		['battery current (A)', 'currentA', 'A', true],
		['cell_core', 'cellC', '°C', false],
		['BMS', 'boardC', '°C', false],
		['Speed m/s', 'speedKmh', 'm/s', true],
		['vehicle speed', 'speedKmh', 'km/h', false],
		['engine speed rpm', null, null, false],
		['battery voltage', null, null, false],
		['ambient humidity %', null, null, false],
		['Probe 3 (°F)', null, '°F', true]
	])('%s', (name, channel, unit, unitSaid) => {
		expect(findChannel(name)).toEqual({ channel, unit, unitSaid });
	});

	it('that tell of the same channel twice leave the second to a person', () => {
		const { columns } = look(['s,cell a,cell b', '0,20,21', '1,20,21']);
		expect(columns.map(({ channel }) => channel)).toEqual([null, 'cellC', null]);
	});
});

describe('the order of a date', () => {
	it.each([
		['day first, since there is no month 31', ['30/01/2026', '31/01/2026'], 'dmy', false],
		['month first, since there is no month 31', ['01/30/2026', '01/31/2026'], 'mdy', false],
		['year first', ['2026/01/02', '2026/01/03'], 'ymd', false],
		[
			'day first, since the days then follow each other',
			['01/02/2026', '02/02/2026', '03/02/2026'],
			'dmy',
			false
		],
		[
			'month first, since the days then follow each other',
			['02/01/2026', '02/02/2026', '02/03/2026'],
			'mdy',
			false
		],
		['day first with two digits of the year', ['30.01.26', '31.01.26'], 'dmy', false],
		['open on a single day, and said so', ['02/03/2026', '02/03/2026'], 'dmy', true],
		['as the month’s name says', ['2 Mar 2026', '3 Mar 2026'], 'dmy', false],
		['as the month’s name says, before the day', ['Mar 2, 2026', 'Mar 3, 2026'], 'mdy', false]
	])('is %s', (_, cells, order, ambiguous) => {
		const quoted = look(['when|cell', ...cells.map((cell, at) => `${cell} 10:0${at}:00|20.${at}`)]);
		expect(quoted.time).toMatchObject({ mapping: { order }, ambiguous });
		expect(quoted.notes.some((note) => note.includes('fits as well'))).toBe(ambiguous);
	});

	it('is told in words', () => {
		expect(dates(['02/03/2026', '02/03/2026']).time.why).toBe(
			'Dates in column 1 read as day, month, year; month, day, year fits as well.'
		);
	});
});

describe('the time', () => {
	it.each([
		['seconds since 1970', ['1769868000', '1769868001'], 'epoch-s'],
		['milliseconds since 1970', ['1769868000000', '1769868001000'], 'epoch-ms'],
		['a time of day', ['14:00:00', '14:00:01'], 'time-of-day'],
		['seconds since the start', ['0', '1'], 'elapsed-s']
	])('may be %s', (_, cells, kind) => {
		expect(look(['t,cell', ...cells.map((cell) => `${cell},20`)]).time.mapping.kind).toBe(kind);
	});

	it('since 1970 is of a zone all the same: that of the vehicle, for the time of day', () => {
		const lines = ['t,cell', '1769868000,20', '1769868060,20'];
		const { time, mapping } = look(lines, 'Australia/Darwin');
		expect(time.mapping).toEqual({ kind: 'epoch-s', column: 1, timeZone: 'Australia/Darwin' });
		// 2026-01-31T14:00Z; Darwin is 9 h 30 min ahead of UTC all year (IANA time zone database).
		const hourOf = (asked: TraceMapping) => {
			const { trace } = readText(lines.join('\n'), asked, { firstRowLine: 2 });
			return clockHourAt(trace, trace.startS);
		};
		expect(hourOf(mapping)).toBeCloseTo(23.5, 9);
		expect(hourOf({ ...mapping, time: { kind: 'epoch-s', column: 1 } })).toBeCloseTo(14, 9);
	});

	it('counts minutes where the name says so, and seconds where none does, which is said', () => {
		const named = (name: string) => look([`${name},cell`, '0,20', '1,20', '2,21']).time;
		expect(named('elapsed (min)')).toMatchObject({ mapping: { kind: 'elapsed-min' }, ambiguous: false });
		expect(named('x')).toMatchObject({ mapping: { kind: 'elapsed-s' }, ambiguous: true });
	});

	it('is not the number of a row', () => {
		const { mapping } = look(['No,elapsed s,cell', '1,0,20', '2,10,20', '3,20,21']).time;
		expect(mapping).toEqual({ kind: 'elapsed-s', column: 2 });
		expect(refusalOf(() => look(['Record,cell', '1,20', '2,20']))).toMatchObject({
			code: 'no_time_column',
			line: 1
		});
	});

	it('with an offset needs no zone', () => {
		expect(look(['t,cell', '2026-01-31T14:00Z,20', '2026-01-31T14:01Z,20']).time.needsZone).toBe(false);
	});
});

describe('what is no trace', () => {
	it.each([
		['a picture', '\u0089PNG\u0001\u0002\u0003\u0004\u0005\u0006', 'binary_content'],
		['zero bytes', 's,cell\n0,2\u00000\n', 'binary_content'],
		['a letter', 'Dear workshop,\nit was hot.\n', 'no_numeric_rows'],
		['nothing', '', 'no_numeric_rows']
	])('%s is refused', (_, text, code) => {
		expect(refusalOf(() => describeTrace(toBytes(text))).code).toBe(code);
	});

	it('nor is a zone that there is not', () => {
		expect(refusalOf(() => look(['s,cell', '0,20'], 'Nowhere/Else')).code).toBe('no_such_zone');
	});
});

describe('a logger is known again', () => {
	const header = ['Time', 'Cell (°C) 200417', 'Bay'];
	it('by the names of its columns, whatever its serial number', () => {
		expect(loggerFingerprint(header)).toBe(loggerFingerprint(['time ', 'cell  (°C) 9912345', 'BAY']));
		expect(loggerFingerprint(header)).toMatch(/^[0-9a-f]{16}$/);
	});

	it.each([
		['another name', ['Time', 'Cell (°F) 200417', 'Bay']],
		['another order', ['Time', 'Bay', 'Cell (°C) 200417']],
		['a column more', [...header, '']],
		['another cut', ['Time', 'Cell (°C) 200417Bay']]
	])('but not with %s', (_, other) => {
		expect(loggerFingerprint(other)).not.toBe(loggerFingerprint(header));
	});
});
