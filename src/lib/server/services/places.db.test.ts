import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { placeInputSchema } from '$lib/schemas/places';
import { createPlace, getPlace, listPlaces, updatePlace } from './places';

useTestDatabase();

const PLACE = placeInputSchema.parse({
	...{
		name: 'Salt Lake',
		region: 'North',
		latitudeDeg: -28,
		longitudeDeg: 137,
		altitudeM: 20,
		climateZone: 'BWh'
	},
	...{ hotDayMaxC: 44.5, dailyRangeK: 16, sunPeakWPerM2: 1050, source: 'Invented for this test' }
});

describe('places', () => {
	it('come back as they were entered, in order of their names', async () => {
		const { installer } = await makeCrew();
		await createPlace(installer, PLACE);
		await createPlace(installer, { ...PLACE, name: 'Ash Ridge' });
		const places = await listPlaces(installer);
		expect(places.map(({ name }) => name)).toEqual(['Ash Ridge', 'Salt Lake']);
		expect(places[1]).toMatchObject(PLACE);
	});

	it('are changed by whoever saw the newest version, and by nobody else', async () => {
		const { installer, engineer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		await updatePlace(engineer, id, { ...PLACE, hotDayMaxC: 46, version });
		await expect(updatePlace(installer, id, { ...PLACE, hotDayMaxC: 40, version })).rejects.toMatchObject({
			code: 'changed_meanwhile'
		});
		expect((await getPlace(installer, id)).hotDayMaxC).toBe(46);
	});

	it('lose no change when two people save at the same moment', async () => {
		const { installer, engineer } = await makeCrew();
		const { id, version } = await createPlace(installer, PLACE);
		const saves = await Promise.allSettled([
			updatePlace(installer, id, { ...PLACE, hotDayMaxC: 41, version }),
			updatePlace(engineer, id, { ...PLACE, hotDayMaxC: 43, version })
		]);
		expect(saves.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
	});

	it('have names of their own within a workshop', async () => {
		const { installer } = await makeCrew();
		await createPlace(installer, PLACE);
		await expect(createPlace(installer, PLACE)).rejects.toMatchObject({
			code: 'conflict',
			problems: [{ path: 'name' }]
		});
	});

	it('of another workshop do not exist', async () => {
		const [ours, theirs] = await Promise.all([makeCrew(), makeCrew()]);
		const { id } = await createPlace(theirs.manager, PLACE);
		await expect(getPlace(ours.manager, id)).rejects.toMatchObject({ code: 'not_found' });
		await expect(updatePlace(ours.manager, id, { ...PLACE, version: 0 })).rejects.toMatchObject({
			code: 'not_found'
		});
		expect(await listPlaces(ours.manager)).toEqual([]);
	});
});
