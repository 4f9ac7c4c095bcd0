import { describe, expect, it } from 'vitest';
import { formatClockHour, formatHours, formatHourTick, sayHours } from './time';

describe('the clock', () => {
	it.each([
		[16.85, '16:51'],
		[0, '00:00'],
		[23.9999, '00:00 next day'],
		[25.5, '01:30 next day'],
		[50, '02:00 on day 3']
	])('says hour %s as "%s"', (hour, words) => {
		expect(formatClockHour(hour)).toBe(words);
	});

	it.each([
		[8, '08'],
		[12, 'noon'],
		[24, 'midnight'],
		[36, 'noon']
	])('puts %s under a tick as "%s"', (hour, words) => {
		expect(formatHourTick(hour)).toBe(words);
	});
});

describe('a length of time', () => {
	it.each([
		[4.0167, '4 h 1 min'],
		[0.5, '30 min'],
		[2, '2 h'],
		[1.9999, '2 h']
	])('%s is "%s" as a figure', (hours, text) => {
		expect(formatHours(hours).replace(/\u202F/g, ' ')).toBe(text);
	});

	it.each([
		[0.1, 'a few minutes'],
		[0.33, 'about 20 minutes'],
		[0.5, 'half an hour'],
		[1.05, 'an hour'],
		[1.5, 'an hour and a half'],
		[2.05, 'two hours'],
		[2.6, 'two and a half hours'],
		[14, '14 hours']
	])('%s is "%s" in a sentence', (hours, words) => {
		expect(sayHours(hours)).toBe(words);
	});
});
