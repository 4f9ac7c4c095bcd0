import { describe, expect, it } from 'vitest';
import { latestToday } from '../format/dates';
import { capacityTestSchema } from './field-notes';
import { fittingChangeSchema, pastDay } from './fitting';

const DAY_MS = 86_400_000;
const day = pastDay('Fitted on');
const refusalOf = (given: string): string | undefined => day.safeParse(given).error?.issues[0]?.message;

describe('a day that is past', () => {
	it('may be the first there can be, and today where the day begins earliest', () => {
		expect(refusalOf('2000-01-01')).toBeUndefined();
		expect(refusalOf(latestToday())).toBeUndefined();
	});

	it.each([
		['1999-12-31', 'Fitted on must be 2000-01-01 or later.'],
		[latestToday(new Date(Date.now() + 2 * DAY_MS)), 'Fitted on must not be in the future.'],
		['yesterday', 'Fitted on must be a day, such as 2026-03-04.']
	])('is not %s', (given, message) => {
		expect(refusalOf(given)).toBe(message);
	});

	it('is what a fitting and a note ask for', () => {
		const fitting = { fittedBy: 'Ida Fenn', differences: [], version: null };
		const test = { kind: 'capacity-test', capacityAh: 95, currentA: 5, cutOffV: 10.8, tempC: 25 };
		const messages = [
			fittingChangeSchema.safeParse({ ...fitting, fittedOn: '2999-01-01' }),
			capacityTestSchema.safeParse({ ...test, notedOn: '2999-01-01' })
		].map(({ error }) => error?.issues.map(({ message }) => message));
		expect(messages).toEqual([
			['Fitted on must not be in the future.'],
			['Tested on must not be in the future.']
		]);
	});
});
