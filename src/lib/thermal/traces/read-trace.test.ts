import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { listRows, readBytes, readText, SECONDS, toBytes } from '../../../../tests/support/trace-files';
import { describeTrace } from './describe-trace';
import { DECIMALS, DELIMITERS, type Decimal, type Delimiter, type TimeMapping } from './mapping';
import type { TraceReading } from './reading-types';

const START_S = Math.floor(Date.UTC(2026, 0, 31, 22, 30) / 1000);
const ROWS = 120;
/** Two minutes of a second each, over midnight UTC. */
const values = Array.from({ length: ROWS }, (_, row) => ({
	timeS: START_S + row * 60,
	cellC: Math.round((30 + row / 7) * 100) / 100,
	currentA: Math.round(Math.sin(row) * 1000) / 100
}));

const two = (value: number): string => String(value).padStart(2, '0');
const parts = (timeS: number) => {
	const at = new Date(timeS * 1000);
	const day = [at.getUTCFullYear(), two(at.getUTCMonth() + 1), two(at.getUTCDate())] as const;
	const clock = `${two(at.getUTCHours())}:${two(at.getUTCMinutes())}:${two(at.getUTCSeconds())}`;
	return { day, clock };
};

type Kind =
	| 'epoch-s'
	| 'epoch-ms'
	| 'iso-z'
	| 'iso'
	| 'basic'
	| 'dmy'
	| 'mdy'
	| 'ymd'
	| 'apart'
	| 'words'
	| 'pm'
	| 'clock'
	| 's'
	| 'min';
const TIMES: Record<Kind, { header: string[]; cells: (timeS: number) => string[] }> = {
	'epoch-s': { header: ['time'], cells: (t) => [String(t)] },
	'epoch-ms': { header: ['time'], cells: (t) => [String(t * 1000)] },
	'iso-z': { header: ['time'], cells: (t) => [new Date(t * 1000).toISOString()] },
	iso: { header: ['time'], cells: (t) => [`${parts(t).day.join('-')}T${parts(t).clock}`] },
	basic: {
		header: ['time'],
		cells: (t) => [`${parts(t).day.join('')}T${parts(t).clock.replaceAll(':', '')}`]
	},
	dmy: { header: ['time'], cells: (t) => [`${[...parts(t).day].reverse().join('.')} ${parts(t).clock}`] },
	mdy: {
		header: ['time'],
		cells: (t) => {
			const [year, month, day] = parts(t).day;
			return [`${Number(month)}/${Number(day)}/${year} ${parts(t).clock}`];
		}
	},
	ymd: { header: ['time'], cells: (t) => [`${parts(t).day.join('/')} ${parts(t).clock}`] },
	apart: { header: ['date', 'clock'], cells: (t) => [[...parts(t).day].reverse().join('/'), parts(t).clock] },
	words: {
		header: ['time'],
		cells: (t) => [
			`${parts(t).day[2]}-${parts(t).day[1] === '01' ? 'Jan' : 'February'}-2026 ${parts(t).clock}`
		]
	},
	pm: {
		header: ['time'],
		cells: (t) => {
			const [hour, ...rest] = parts(t).clock.split(':');
			const twelve = Number(hour) % 12 === 0 ? 12 : Number(hour) % 12;
			return [`${parts(t).day.join('-')} ${twelve}:${rest.join(':')} ${Number(hour) < 12 ? 'am' : 'PM'}`];
		}
	},
	clock: { header: ['time'], cells: (t) => [parts(t).clock] },
	s: { header: ['elapsed s'], cells: (t) => [String(t - START_S)] },
	min: { header: ['elapsed min'], cells: (t) => [String((t - START_S) / 60)] }
};
const KINDS = Object.keys(TIMES) as Kind[];

function write(kind: Kind, delimiter: Delimiter, decimal: Decimal): string {
	const { header, cells } = TIMES[kind];
	const show = (value: number): string => {
		const text = value.toFixed(2).replace('.', decimal);
		return delimiter === decimal ? `"${text}"` : text;
	};
	const lines = [
		[...header, 'Cell (°C)', 'Current (A)'],
		...values.map(({ timeS, cellC, currentA }) => [...cells(timeS), show(cellC), show(currentA)])
	];
	return lines.map((line) => line.join(delimiter)).join('\r\n');
}

/** The channels of a reading and how far its start lies after the first row. */
const figures = ({ trace }: TraceReading) => ({ ...trace, startS: 0, timeBase: '', timeZone: '' });

describe('the same day, written in each way', () => {
	const plain = readText(
		write('epoch-s', ',', '.'),
		describeTrace(toBytes(write('epoch-s', ',', '.'))).mapping
	);
	const cases = KINDS.flatMap((kind) =>
		DELIMITERS.flatMap((delimiter) => DECIMALS.map((decimal) => [kind, delimiter, decimal] as const))
	);

	it.each(cases)(
		'with times as %s, %j between cells and %s in numbers is the same trace',
		(kind, delimiter, decimal) => {
			const text = write(kind, delimiter, decimal);
			const proposal = describeTrace(toBytes(text));
			expect([proposal.delimiter, proposal.decimal]).toEqual([delimiter, decimal]);
			const reading = readText(text, proposal.mapping, { firstRowLine: proposal.firstRowLine });
			expect(reading.report.rows).toMatchObject({ read: ROWS, kept: ROWS });
			expect(figures(reading)).toEqual(figures(plain));
			const fromS = { utc: START_S, 'time-of-day': START_S % 86_400, elapsed: 0 }[reading.trace.timeBase];
			expect(reading.trace.startS).toBe(fromS);
		}
	);

	it('has the values that were written', () => {
		const { count, mean, max } = plain.trace.channels.cellC!;
		expect(plain.trace).toMatchObject({ stepS: 60, binCount: ROWS, startS: START_S });
		expect([count[0], mean[0], max[119]]).toEqual([1, 30, Math.fround(47)]);
		expect(plain.trace.channels.currentA!.mean[1]).toBeCloseTo(8.41, 5);
	});
});

describe('the bytes of a file', () => {
	const text = `# logger 7\r\n"s";"Cell (°C), ""core""";Note\r\n0;2,5;"a\nb"\r\n\r\n1;"2";x;y\n2;−1,5;ü\r3;25e-1;`;
	const mapping = { ...SECONDS, delimiter: ';', decimal: ',' } as const;
	const whole = readText(text, mapping);

	it('hold quoted cells, line ends of three kinds, cells too many, and the minus of typesetters', () => {
		expect(listRows(text, mapping)).toEqual([
			[0, 2.5],
			[1, 2],
			[2, -1.5],
			[3, 2.5]
		]);
		expect(whole.report.lines).toEqual({ total: 7, before: 2, blank: 1, comments: 0 });
	});

	it('hold quotation marks twice within a cell, and what would part cells behind them', () => {
		const quoted = '"a"";b";x\n0;2,5\n"1";"2,""5"\n2;3\n';
		const { report } = readText(quoted, mapping);
		expect(report.lines).toMatchObject({ total: 4, before: 1 });
		expect(report.findings).toEqual([{ reason: 'unreadable', line: 3, column: 2, value: '2,""5' }]);
		const asTime = '0;2\n"1"";9";2\n2;2\n';
		expect(readText(asTime, mapping).report.findings).toEqual([
			{ reason: 'noTime', line: 2, column: 1, value: '1"";9' }
		]);
	});

	it('may come in pieces cut anywhere', () => {
		const bytes = toBytes(text);
		for (let pieceBytes = 1; pieceBytes <= bytes.length; pieceBytes++) {
			expect(readBytes(bytes, mapping, { pieceBytes })).toEqual(whole);
		}
	});

	it('may be cut anywhere in a long file too, as any cuts show', () => {
		const bytes = toBytes(write('iso', ';', ','));
		const { mapping: found } = describeTrace(bytes, 'Australia/Adelaide');
		const once = readBytes(bytes, found);
		fc.assert(
			fc.property(fc.integer({ min: 1, max: bytes.length }), (pieceBytes) => {
				expect(readBytes(bytes, found, { pieceBytes })).toEqual(once);
			}),
			{ numRuns: 30, seed: 7 }
		);
	});

	const utf16 = (marked: boolean, little: boolean): Uint8Array => {
		const signs = `${marked ? '\uFEFF' : ''}s;Cell (°C)\n0;20,5\n1;21\n`;
		const bytes = new Uint8Array(signs.length * 2);
		const view = new DataView(bytes.buffer);
		Array.from(signs).forEach((sign, at) => view.setUint16(2 * at, sign.charCodeAt(0), little));
		return bytes;
	};
	it.each([
		['UTF-8 with its mark', toBytes('\uFEFFs;Cell (°C)\n0;20,5\n1;21\n')],
		['UTF-16, little end first, marked', utf16(true, true)],
		['UTF-16, big end first, marked', utf16(true, false)],
		['UTF-16, little end first, unmarked', utf16(false, true)],
		['UTF-16, big end first, unmarked', utf16(false, false)],
		['Windows-1252', Uint8Array.from('s;Cell (\u00b0C)\n0;20,5\n1;21\n', (sign) => sign.charCodeAt(0))]
	])('may be %s', (_, bytes) => {
		const proposal = describeTrace(bytes);
		expect(proposal.columns[1]).toMatchObject({
			name: 'Cell (°C)',
			channel: 'cellC',
			unit: '°C',
			unitSaid: true
		});
		for (const pieceBytes of [1, 3, bytes.length]) {
			const { trace, report } = readBytes(bytes, proposal.mapping, { pieceBytes });
			expect(report.rows.kept).toBe(2);
			expect(trace.channels.cellC!.max.at(-1)).toBe(21);
		}
	});
});

describe('units', () => {
	it.each([
		['bayAirC', '°F', '212', 100],
		['bayAirC', '°C', '100', 100],
		['speedKmh', 'm/s', '10', 36],
		['speedKmh', 'mph', '100', 160.9344],
		['currentA', 'mA', '-1500', -1.5]
	] as const)('of %s in %s: %s is %d', (channel, unit, cell, expected) => {
		const mapping = { ...SECONDS, columns: [{ column: 2, channel, unit }] };
		expect(listRows(`0,${cell}\n1,${cell}\n`, mapping)[1]![1]).toBeCloseTo(expected, 9);
	});

	it('may be of a logger that counts current the other way round', () => {
		const mapping = {
			...SECONDS,
			columns: [{ column: 2, channel: 'currentA', unit: 'A', reversed: true }]
		} as const;
		expect(listRows('0,5\n1,-3\n', { ...mapping, columns: [...mapping.columns] })).toEqual([
			[0, -5],
			[1, 3]
		]);
	});
});

describe('local times', () => {
	const calendar = (timeZone: string): TimeMapping => {
		return { kind: 'calendar', column: 1, clockColumn: null, order: 'ymd', timeZone };
	};
	const read = (cells: readonly string[], timeZone: string) => {
		const mapping = { ...SECONDS, time: calendar(timeZone) };
		const text = cells.map((cell) => `${cell},20\n`).join('');
		return { rows: listRows(text, mapping), report: readText(text, mapping).report };
	};
	const utc = (...at: Parameters<typeof Date.UTC>) => Date.UTC(...at) / 1000;

	it('are of their zone', () => {
		const { rows } = read(['2026-01-31 14:00', '2026-01-31 14:01'], 'Australia/Darwin');
		expect(rows[0]![0]).toBe(utc(2026, 0, 31, 4, 30));
	});

	it('with an offset are of that, whatever the zone', () => {
		const cells = [
			'2026-01-31T14:00:00+09:30',
			'2026-01-31T14:00:01.25+0930',
			'2026-01-31T04:30:02Z',
			'2026-01-30T23:30:03-05'
		];
		const start = utc(2026, 0, 31, 4, 30);
		expect(read(cells, 'Europe/Paris').rows.map(([timeS]) => timeS - start)).toEqual([0, 1.25, 2, 3]);
	});

	it('go on through the hour that comes twice, in order, and are counted', () => {
		const hour = (h: number) => ['00', '15', '30', '45'].map((minute) => `2024-10-27 0${h}:${minute}`);
		const { rows, report } = read([...hour(1), ...hour(2), ...hour(2), ...hour(3)], 'Europe/Paris');
		const first = utc(2024, 9, 26, 23, 0);
		expect(rows.map(([timeS]) => (timeS - first) / 900)).toEqual(Array.from({ length: 16 }, (_, at) => at));
		expect(report.clockChanges).toEqual({ twiceRows: 8, neverRows: 0 });
		expect(report.rows).toMatchObject({ kept: 16, moved: 0 });
	});

	it('and through a half hour that comes twice', () => {
		const cells = ['01:15', '01:30', '01:45', '01:30', '01:45', '02:00'].map(
			(clock) => `2024-04-07 ${clock}`
		);
		const { rows } = read(cells, 'Australia/Lord_Howe');
		expect(rows.map(([timeS]) => (timeS - rows[0]![0]) / 900)).toEqual([0, 1, 2, 3, 4, 5]);
	});

	it('and at hourly rows, and with rows that stand twice in it', () => {
		const hourly = read(
			['00:00', '01:00', '02:00', '02:00', '03:00'].map((c) => `2024-10-27 ${c}`),
			'Europe/Paris'
		);
		expect(hourly.rows.map(([timeS]) => (timeS - hourly.rows[0]![0]) / 3600)).toEqual([0, 1, 2, 3, 4]);
		const seconds = ['02:10:00', '02:10:01', '02:10:01', '02:10:02'].map((c) => `2024-10-27 ${c}`);
		expect(read(seconds, 'Europe/Paris').report.rows).toMatchObject({ kept: 3, dropped: { repeated: 1 } });
	});

	it('that never come are read by the clock from before, and counted', () => {
		const { rows, report } = read(
			['2024-03-31 01:59', '2024-03-31 02:30', '2024-03-31 03:31'],
			'Europe/Paris'
		);
		expect(rows.map(([timeS]) => (timeS - utc(2024, 2, 31, 0, 59)) / 60)).toEqual([0, 31, 32]);
		expect(report.clockChanges).toEqual({ twiceRows: 0, neverRows: 1 });
	});

	it('of the day alone go over midnight, a row out of order included', () => {
		const time = { kind: 'time-of-day', column: 1, firstDay: '2026-01-31', timeZone: 'UTC' } as const;
		const text = ['23:59:58', '00:00:00', '23:59:59', '00:00:01'].map((clock) => `${clock},20\n`).join('');
		const start = utc(2026, 0, 31, 23, 59, 58);
		expect(listRows(text, { ...SECONDS, time }).map(([timeS]) => timeS - start)).toEqual([0, 1, 2, 3]);
		expect(listRows(text, { ...SECONDS, time: { ...time, firstDay: null } })[3]![0]).toBe(86_401);
	});

	it.each([
		'2026-02-29 10:00',
		'2026-13-01 10:00',
		'2026-01-31 24:01',
		'2026-01-31 10:60',
		'2026-01-31',
		'31.1.2026 10:00'
	])('%s is none, and counted with its place', (cell) => {
		const { report } = read(['2026-01-30 10:00', cell, '2026-02-01 10:00'], 'UTC');
		expect(report.rows).toMatchObject({ read: 3, kept: 2 });
		expect(report.findings).toEqual([{ reason: 'noTime', line: 2, column: 1, value: cell }]);
	});
});
