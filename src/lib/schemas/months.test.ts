import { describe, expect, it } from 'vitest';
import { parseForm } from '../format/form-values';
import { fromJobClimateForm, jobClimateFormSchema, toDaysOnRoadBoxes } from './job-climate-form';
import { MONTH_KEYS } from './months';
import { fromPlaceForm, placeFormSchema, toPlaceForm } from './place-form';
import { placeInputSchema } from './places';

const SITE = {
	...{ name: 'Salt Lake', region: '', latitudeDeg: '-28', longitudeDeg: '137', altitudeM: '20' },
	...{ climateZone: 'BWh', hotDayMaxC: '44.5', dailyRangeK: '16', sunPeakWPerM2: '1050', source: 'Invented' }
};
const row = (name: string, text: string) =>
	Object.fromEntries(MONTH_KEYS.map((key) => [`${name}${key}`, text]));
const MONTHS = {
	...row('monthlyMaxC', '30,5'),
	...row('monthlySpreadK', '3'),
	monthsSource: 'Invented'
};
const twelve = (value: number): number[] => Array<number>(12).fill(value);

function problemsOf(entries: Record<string, string>): { path: string; message: string }[] {
	const parsed = parseForm(placeFormSchema, entries);
	return 'errors' in parsed ? parsed.errors : [];
}

describe('the months of a place in its form', () => {
	it('become two rows of twelve', () => {
		const parsed = parseForm(placeFormSchema, { ...SITE, ...MONTHS, monthlyMaxCJul: '59 °F' });
		if (!('data' in parsed)) throw new Error(parsed.errors[0]?.message);
		const place = fromPlaceForm(parsed.data);
		expect(place.monthlyMaxC).toEqual(twelve(30.5).map((value, month) => (month === 6 ? 15 : value)));
		expect(place.monthlySpreadK).toEqual(twelve(3));
		expect(fromPlaceForm(toPlaceForm(place))).toEqual(place);
	});

	it('may be left out altogether', () => {
		const parsed = parseForm(placeFormSchema, SITE);
		if (!('data' in parsed)) throw new Error(parsed.errors[0]?.message);
		expect(fromPlaceForm(parsed.data)).toMatchObject({
			...{ monthlyMaxC: null, monthlySpreadK: null, monthsSource: null }
		});
	});

	it('are all twelve or none: the first empty box is told with the names of all', () => {
		expect(problemsOf({ ...SITE, ...MONTHS, monthlyMaxCFeb: '', monthlyMaxCSep: ' ' })).toEqual([
			{
				path: 'monthlyMaxCFeb',
				message:
					'Mean of the daily highest: February and September are missing. Give all twelve months, or none.'
			}
		]);
	});

	it('need their spread and their source, too', () => {
		const { monthsSource: _source, ...rows } = { ...MONTHS, ...row('monthlySpreadK', '') };
		expect(problemsOf({ ...SITE, ...rows })).toEqual([
			{
				path: 'monthlySpreadKJan',
				message: 'Spread from day to day: every month is missing. Give all twelve months, or none.'
			},
			{ path: 'monthsSource', message: 'Where the months come from is missing.' }
		]);
	});

	it('say their month where one is no number or cannot be', () => {
		expect(problemsOf({ ...SITE, ...MONTHS, monthlyMaxCMay: 'mild', monthlySpreadKDec: '21' })).toEqual([
			{
				path: 'monthlyMaxCMay',
				message: 'May, mean of the daily highest must be a number of °C from −60 to 60.'
			},
			{ path: 'monthlySpreadKDec', message: 'December, spread from day to day must be at most 20 K.' }
		]);
	});
});

describe('the months of a place in the API', () => {
	const place = placeInputSchema.parse({
		...{ name: 'Salt Lake', latitudeDeg: -28, longitudeDeg: 137, altitudeM: 20, climateZone: 'BWh' },
		...{ hotDayMaxC: 44.5, dailyRangeK: 16, sunPeakWPerM2: 1050, source: 'Invented' }
	});
	const messagesOf = (changes: object) =>
		placeInputSchema.safeParse({ ...place, ...changes }).error?.issues.map(({ message }) => message);

	it('are both rows and a source, or nothing', () => {
		const months = { monthlyMaxC: twelve(30), monthlySpreadK: twelve(3), monthsSource: 'Invented' };
		expect(messagesOf(months)).toBeUndefined();
		expect(messagesOf({ ...months, monthlySpreadK: null })).toEqual([
			'Spread from day to day is missing: the months need both rows and their source, or none of them.'
		]);
	});

	it('are twelve, within what can be', () => {
		const months = { monthlySpreadK: twelve(3), monthsSource: 'Invented' };
		expect(messagesOf({ ...months, monthlyMaxC: twelve(30).slice(1) })).toEqual([
			'Mean of the daily highest must have twelve entries, January to December.'
		]);
		expect(messagesOf({ ...months, monthlyMaxC: twelve(61) })).toContain(
			'Mean of the daily highest must be at most 60 °C.'
		);
	});
});

describe('the days on the road in the form of a job', () => {
	const CLIMATE = { placeId: '1', hotDayMaxC: '40', dailyRangeK: '15', sunPeakWPerM2: '1000', version: '0' };
	const read = (entries: Record<string, string>) =>
		parseForm(jobClimateFormSchema, { ...CLIMATE, ...entries });

	it('become a row of twelve whole numbers, or none at all', () => {
		const parsed = read(row('daysOnRoad', '6'));
		if (!('data' in parsed)) throw new Error(parsed.errors[0]?.message);
		expect(fromJobClimateForm(parsed.data).daysOnRoad).toEqual(twelve(6));
		const empty = read({});
		if (!('data' in empty)) throw new Error(empty.errors[0]?.message);
		expect(fromJobClimateForm(empty.data).daysOnRoad).toBeNull();
		expect(toDaysOnRoadBoxes(null).daysOnRoadMar).toBeNull();
	});

	it('are all twelve or none, whole, and no more than a month has', () => {
		const problems = (entries: Record<string, string>) => {
			const parsed = read({ ...row('daysOnRoad', '6'), ...entries });
			return 'errors' in parsed ? parsed.errors.map(({ message }) => message) : [];
		};
		expect(problems({ daysOnRoadJun: '' })).toEqual([
			'Days on the road: June is missing. Give all twelve months, or none.'
		]);
		expect(problems({ daysOnRoadJun: '32', daysOnRoadJul: '2,5', daysOnRoadAug: '-1' })).toEqual([
			'June, days on the road must be at most 31.',
			'July, days on the road must be a whole number from 0 to 31.',
			'August, days on the road must be at least 0.'
		]);
	});
});
