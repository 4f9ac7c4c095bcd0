import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { placeInputSchema } from '$lib/schemas/places';
import { Place } from '../db/models';
import { createPlace } from '../services/places';
import { answerOnce } from './idempotency';

useTestDatabase();

const PLACE = placeInputSchema.parse({
	...{ name: 'Gravel Pit', region: '', latitudeDeg: 0, longitudeDeg: 0, altitudeM: 0, climateZone: 'BWh' },
	...{ hotDayMaxC: 40, dailyRangeK: 15, sunPeakWPerM2: 1000, source: 'Invented for this test' }
});

describe('a request that is repeated with its key', () => {
	it('makes one row out of fifty at once, and gives all of them the same answer', async () => {
		const { installer } = await makeCrew();
		const once = () =>
			answerOnce({ personId: installer.id, key: 'from-the-bay', request: 'create place' }, async () => ({
				status: 201,
				body: JSON.stringify(await createPlace(installer, PLACE))
			}));
		const answers = await Promise.all(Array.from({ length: 50 }, once));
		expect(await Place.count({ where: { workshopId: installer.workshopId } })).toBe(1);
		expect(new Set(answers.map(({ body }) => body)).size).toBe(1);
		expect(answers.every(({ status }) => status === 201)).toBe(true);
	});

	it('is refused when it asks for something else', async () => {
		const { installer } = await makeCrew();
		const ask = (request: string) =>
			answerOnce({ personId: installer.id, key: 'k', request }, () =>
				Promise.resolve({ status: 200, body: '{}' })
			);
		await ask('first');
		await expect(ask('second')).rejects.toMatchObject({ code: 'idempotency_key_reused' });
	});

	it('is a key of its own for each person', async () => {
		const { installer, manager } = await makeCrew();
		const ask = (personId: number, body: string) =>
			answerOnce({ personId, key: 'k', request: 'same' }, () => Promise.resolve({ status: 200, body }));
		expect((await ask(installer.id, '"a"')).body).toBe('"a"');
		expect((await ask(manager.id, '"b"')).body).toBe('"b"');
	});

	it('may be tried again after a failure, which kept nothing', async () => {
		const { installer } = await makeCrew();
		const ask = (work: () => Promise<{ status: number; body: string }>) =>
			answerOnce({ personId: installer.id, key: 'k', request: 'same' }, work);
		const failing = async () => {
			await createPlace(installer, PLACE);
			throw new Error('the line broke');
		};
		await expect(ask(failing)).rejects.toThrow('the line broke');
		expect(await Place.count({ where: { workshopId: installer.workshopId } })).toBe(0);
		expect((await ask(() => Promise.resolve({ status: 200, body: '{}' }))).status).toBe(200);
	});

	it('needs a key that can stand in a header', async () => {
		const { installer } = await makeCrew();
		const ask = (key: string) =>
			answerOnce({ personId: installer.id, key, request: 'r' }, () =>
				Promise.resolve({ status: 200, body: '' })
			);
		await expect(ask('with space')).rejects.toMatchObject({ code: 'malformed_request' });
		await expect(ask('x'.repeat(121))).rejects.toMatchObject({ code: 'malformed_request' });
	});
});
