import { describe, expect, it } from 'vitest';
import {
	formatBytes,
	formatReading,
	listFigureTicks,
	listTimeTicks,
	sayJump,
	sayTraceSpan,
	sayTraceTime,
	type TraceClock
} from './traces';

const UTC: TraceClock = {
	timeBase: 'utc',
	timeZone: 'Australia/Darwin',
	startS: 1_770_076_800,
	startHour: 9.5
};
const DAY: TraceClock = { timeBase: 'elapsed', timeZone: null, startS: 0, startHour: 22.5 };
const NOBODY: TraceClock = { timeBase: 'elapsed', timeZone: null, startS: 600, startHour: null };
const plain = (text: string): string => text.replace(/\u202f/g, ' ');

describe('a time of a trace', () => {
	it('is said with its date, by the clock, or from the start, as far as anybody knows', () => {
		expect(sayTraceTime(UTC, UTC.startS)).toBe('3 Feb 2026, 09:30');
		expect(sayTraceTime(DAY, 2 * 3600)).toBe('00:30 next day');
		expect(plain(sayTraceTime(NOBODY, 600 + 3900))).toBe('1 h 05 min after the start');
	});

	it('names the day of a span once', () => {
		expect(sayTraceSpan(UTC, UTC.startS, UTC.startS + 3600)).toBe('3 Feb 2026, 09:30 to 10:30');
		expect(sayTraceSpan(UTC, UTC.startS, UTC.startS + 86_400)).toBe('3 Feb 2026, 09:30 to 4 Feb 2026, 09:30');
	});

	it('says of a change that cannot be from when to when it lasted, and how far off it was', () => {
		const jump = { channel: 'cellC', fromS: UTC.startS, toS: UTC.startS + 240, offK: 62.4 } as const;
		expect(plain(sayJump(UTC, { ...jump, stays: false }))).toBe(
			'Cells, 3 Feb 2026, 09:30 to 09:34: up to 62 K off what stood before'
		);
		expect(plain(sayJump(UTC, { ...jump, stays: true }))).toBe(
			'Cells, 3 Feb 2026, 09:30: 62 K at once, and not back'
		);
	});

	it('is marked at round times of the clock, the day where it changes', () => {
		const ticks = listTimeTicks(DAY, 0, 6 * 3600, 4);
		expect(ticks).toEqual([
			{ atS: 5400, text: 'day 2' },
			{ atS: 5400 + 2 * 3600, text: '02:00' },
			{ atS: 5400 + 4 * 3600, text: '04:00' }
		]);
		expect(listTimeTicks(UTC, UTC.startS, UTC.startS + 20, 4).map(({ text }) => text)).toEqual(
			[...['09:30:00', '09:30:05', '09:30:10', '09:30:15', '09:30:20']].filter((_, at) => at < 5)
		);
		expect(listTimeTicks(UTC, UTC.startS, UTC.startS + 3 * 86_400, 3).map(({ text }) => text)).toEqual([
			'4 Feb',
			'5 Feb',
			'6 Feb'
		]);
	});
});

describe('figures', () => {
	it('stand with the unit of their channel, and with a dash where nothing was measured', () => {
		expect(plain(formatReading('cellC', 41.26))).toBe('41.3 °C');
		expect(plain(formatReading('speedKmh', 79.6))).toBe('80 km/h');
		expect(formatReading('currentA', null)).toBe('–');
	});

	it('are marked at round steps that hold all of them', () => {
		expect(listFigureTicks(21.3, 58.9, 5)).toEqual([20, 30, 40, 50, 60]);
		expect(listFigureTicks(-5, 36, 2)).toEqual([-25, 0, 25, 50]);
	});

	it('of a file say how large it is', () => {
		expect(plain(formatBytes(51_315))).toBe('50 KB');
		expect(plain(formatBytes(200 * 1024 * 1024))).toBe('200 MB');
	});
});
