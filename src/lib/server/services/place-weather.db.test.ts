import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { PLACE } from '../../../../tests/support/records';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { makeCsv, makeDays, makeEpw, makeEpwLines, makeHours } from '../../../../tests/support/weather-files';
import { AuditEntry, Place } from '../db/models';
import { findBreak } from './audit';
import { previewWeather, putBackWeather, readWeather, takeWeather } from './place-weather';
import { createPlace, getPlace, updatePlace } from './places';

useTestDatabase();

const EPW = makeEpw();
const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);
const sent = (text = EPW, name = 'salt-lake.epw') => ({ name, bytes: bytesOf(text) });
const ALL = { takeHotDay: true, takeSite: true };
const MONTHS_ALONE = { takeHotDay: false, takeSite: false };

/** Thirty-one days of January: 35 °C and eight steps of 0.25 K above it, three times round and four more. */
const JANUARY_MEAN_C = 35 + (0.25 * (3 * 36 + 0 + 1 + 2 + 3)) / 31;

describe('a weather file that is read', () => {
	it('gives the months, the hot day and where it was, rounded as a place has them', () => {
		const reading = readWeather(sent());
		expect(reading.monthlyMaxC[0]).toBeCloseTo(JANUARY_MEAN_C, 2);
		expect(reading.monthlyMaxC).toHaveLength(12);
		expect(reading).toMatchObject({
			...{ dailyRangeK: 14, sunPeakWPerM2: 931, hottestMonth: 'January' },
			site: { latitudeDeg: -28.5, longitudeDeg: 137.25, altitudeM: 121 }
		});
	});

	it('is known again by its name, size and SHA-256', () => {
		const { file } = readWeather(sent(EPW, 'C:\\weather\\salt\u0000-lake.epw'));
		expect(file).toEqual({
			name: 'salt-lake.epw',
			sizeBytes: bytesOf(EPW).byteLength,
			sha256: createHash('sha256').update(EPW).digest('hex')
		});
		expect(readWeather(sent(EPW, '\u0007')).file.name).toBe('weather file');
		expect(readWeather(sent(EPW, 'x'.repeat(300))).file.name).toHaveLength(120);
	});

	it('tells every problem with its line and column, and how many there are', () => {
		const lines = makeEpwLines().map((line, index) => (index >= 8 && index < 38 ? `${line},1` : line));
		const refused = () => readWeather(sent(lines.join('\n')));
		expect(refused).toThrow('The file has 30 problems, of which the first 20 are told. Nothing was stored.');
		const warm = EPW.replace('?9?9,26.0000', '?9?9,warm');
		expect(() => readWeather(sent(warm))).toThrow(
			expect.objectContaining({
				code: 'invalid_input',
				problems: [
					{
						...{ path: 'file', code: 'not-a-number', line: 9, column: { number: 7, name: 'dry bulb' } },
						...{ value: 'warm', limit: 'a number within −90 to 60 °C' },
						message: 'Line 9, column 7 (dry bulb): found warm; needed: a number within −90 to 60 °C.'
					}
				]
			})
		);
	});
});

describe('a weather file for a place', () => {
	it('changes nothing while it is only looked at', async () => {
		const { installer } = await makeCrew();
		const place = await createPlace(installer, PLACE);
		const preview = await previewWeather(installer, place.id, sent());
		expect(preview.place).toEqual(place);
		expect(await getPlace(installer, place.id)).toEqual(place);
	});

	it('brings its months, its hot day and where it was', async () => {
		const { installer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		const reading = readWeather(sent());
		const changed = await takeWeather(installer, id, reading, { ...ALL, version });
		expect(changed).toMatchObject({
			...{ monthlyMaxC: reading.monthlyMaxC, monthlySpreadK: reading.monthlySpreadK },
			...{ hotDayMaxC: reading.hotDayMaxC, dailyRangeK: 14, sunPeakWPerM2: 931 },
			...{ latitudeDeg: -28.5, longitudeDeg: 137.25, altitudeM: 121, weatherFile: reading.file },
			...{ version: version + 1, canPutBack: true, name: PLACE.name }
		});
		expect(changed.source).toContain('salt-lake.epw');
		expect(await getPlace(installer, id)).toEqual(changed);
	});

	it('brings the months alone when that is what was asked', async () => {
		const { installer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		const changed = await takeWeather(installer, id, readWeather(sent()), { ...MONTHS_ALONE, version });
		const { hotDayMaxC, dailyRangeK, sunPeakWPerM2, latitudeDeg, altitudeM, source } = PLACE;
		expect(changed).toMatchObject({
			...{ hotDayMaxC, dailyRangeK, sunPeakWPerM2, latitudeDeg, altitudeM, source }
		});
		expect(changed.monthlyMaxC).toHaveLength(12);
	});

	it('keeps the sun and the site of the place where it knows neither', async () => {
		const { installer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		const noSun = makeCsv().replaceAll(/,\d+$/gm, ',');
		const changed = await takeWeather(installer, id, readWeather(sent(noSun)), { ...ALL, version });
		const { sunPeakWPerM2, latitudeDeg, longitudeDeg } = PLACE;
		expect(changed).toMatchObject({ sunPeakWPerM2, latitudeDeg, longitudeDeg, dailyRangeK: 14 });
		expect(changed.source).toContain('The sun is as it was before.');
	});

	it('is refused when somebody changed the place meanwhile, and then changes nothing', async () => {
		const { installer, engineer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		const newer = await updatePlace(engineer, id, { ...PLACE, hotDayMaxC: 46, version });
		const late = takeWeather(installer, id, readWeather(sent()), { ...ALL, version });
		await expect(late).rejects.toMatchObject({ code: 'changed_meanwhile' });
		expect(await getPlace(installer, id)).toEqual(newer);
	});

	it('with a month of days that are all alike says so, and changes nothing', async () => {
		const { installer } = await makeCrew();
		const place = await createPlace(installer, PLACE);
		const level = makeHours(
			makeDays().map((day) => (day.month === 4 ? { ...day, highestC: 30, lowestC: 18 } : day))
		);
		await expect(previewWeather(installer, place.id, sent(makeEpw(level)))).rejects.toMatchObject({
			code: 'invalid_input',
			problems: [
				{
					path: 'monthlySpreadK.3',
					message: 'April: Spread from day to day must be at least 0.1 K.'
				}
			]
		});
		expect(await getPlace(installer, place.id)).toEqual(place);
	});

	it('is written down with what it replaced, in a trail that is whole, and is not itself kept', async () => {
		const { installer, workshopId } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		await takeWeather(installer, id, readWeather(sent()), { ...ALL, version });
		const entry = await AuditEntry.findOne({ where: { workshopId, action: 'place.weather-taken' } });
		expect(entry?.detail).toMatchObject({
			...{ weatherFile: { name: 'salt-lake.epw' }, before: { hotDayMaxC: PLACE.hotDayMaxC } }
		});
		expect(await findBreak(workshopId)).toBeNull();
		const row = await Place.findByPk(id);
		expect(JSON.stringify(row).length).toBeLessThan(4_000);
	});

	it('is for whoever may change places, of their own workshop', async () => {
		const [ours, theirs] = await Promise.all([makeCrew(), makeCrew()]);
		const { id, version } = await createPlace(ours.installer, PLACE);
		const take = (person: typeof ours.installer) =>
			takeWeather(person, id, readWeather(sent()), { ...ALL, version });
		await expect(take(ours.customer)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(previewWeather(ours.customer, id, sent())).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(putBackWeather(ours.customer, id, version)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(take(theirs.manager)).rejects.toMatchObject({ code: 'not_found' });
		await expect(previewWeather(theirs.manager, id, sent())).rejects.toMatchObject({ code: 'not_found' });
		await expect(putBackWeather(theirs.manager, id, version)).rejects.toMatchObject({ code: 'not_found' });
	});
});

describe('what a weather file replaced', () => {
	it('is put back as it was', async () => {
		const { installer } = await makeCrew();
		const place = await createPlace(installer, PLACE);
		const { id, version } = place;
		const taken = await takeWeather(installer, id, readWeather(sent()), { ...ALL, version });
		const back = await putBackWeather(installer, id, taken.version);
		expect(back).toEqual({ ...place, version: version + 2 });
		expect(await getPlace(installer, id)).toEqual(back);
	});

	it('is put back with the file that was there before', async () => {
		const { installer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		const first = await takeWeather(installer, id, readWeather(sent()), { ...ALL, version });
		const other = readWeather(sent(makeCsv(makeHours(makeDays(7))), 'other.csv'));
		const second = await takeWeather(installer, id, other, { ...ALL, version: first.version });
		expect(second.weatherFile?.name).toBe('other.csv');
		const back = await putBackWeather(installer, id, second.version);
		expect(back).toEqual({ ...first, version: version + 3, canPutBack: false });
	});

	it('is gone once somebody changed the place', async () => {
		const { installer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		const { version: taken, ...place } = await takeWeather(installer, id, readWeather(sent()), {
			...{ ...ALL, version }
		});
		const renamed = await updatePlace(installer, id, { ...place, name: 'Salt Pan', version: taken });
		expect(renamed).toMatchObject({ canPutBack: false, weatherFile: { name: 'salt-lake.epw' } });
		await expect(putBackWeather(installer, id, renamed.version)).rejects.toMatchObject({ code: 'conflict' });
	});

	it('is no longer the file’s when a month is typed over', async () => {
		const { installer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		const { version: taken, ...place } = await takeWeather(installer, id, readWeather(sent()), {
			...{ ...ALL, version }
		});
		const monthlyMaxC = place.monthlyMaxC!.map((value, month) => (month === 0 ? 34 : value));
		const typed = await updatePlace(installer, id, { ...place, monthlyMaxC, version: taken });
		expect(typed).toMatchObject({ weatherFile: null, monthlyMaxC });
	});
});
