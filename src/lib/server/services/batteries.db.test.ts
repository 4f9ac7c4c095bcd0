import { describe, expect, it } from 'vitest';
import { batteryInputSchema } from '$lib/schemas/batteries';
import { BATTERY } from '../../../../tests/support/records';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { createBattery, getBattery, listBatteries, updateBattery } from './batteries';

useTestDatabase();

describe('battery records', () => {
	it('come back as they were entered, in order of maker and model', async () => {
		const { installer } = await makeCrew();
		await createBattery(installer, BATTERY);
		await createBattery(installer, { ...BATTERY, maker: 'Aldine' });
		const batteries = await listBatteries(installer);
		expect(batteries.map(({ maker }) => maker)).toEqual(['Aldine', 'Emberlow']);
		expect(batteries[1]).toMatchObject(BATTERY);
	});

	it('are changed by whoever saw the newest version, and by nobody else', async () => {
		const { installer, engineer } = await makeCrew();
		const { id, version } = await createBattery(installer, BATTERY);
		await updateBattery(engineer, id, { ...BATTERY, dischargeCutC: 75, version });
		const late = updateBattery(installer, id, { ...BATTERY, dischargeCutC: 70, version });
		await expect(late).rejects.toMatchObject({ code: 'changed_meanwhile' });
		expect((await getBattery(installer, id)).dischargeCutC).toBe(75);
	});

	it('stand once in a workshop under their maker and model', async () => {
		const { installer } = await makeCrew();
		await createBattery(installer, BATTERY);
		const twice = createBattery(installer, BATTERY);
		await expect(twice).rejects.toMatchObject({ code: 'conflict', problems: [{ path: 'model' }] });
	});

	it('of another workshop do not exist', async () => {
		const [ours, theirs] = await Promise.all([makeCrew(), makeCrew()]);
		const { id } = await createBattery(theirs.manager, BATTERY);
		const missing = { code: 'not_found' };
		await expect(getBattery(ours.manager, id)).rejects.toMatchObject(missing);
		const change = updateBattery(ours.manager, id, { ...BATTERY, version: 0 });
		await expect(change).rejects.toMatchObject(missing);
		expect(await listBatteries(ours.manager)).toEqual([]);
	});

	it('are not a matter for a customer', async () => {
		const { customer } = await makeCrew();
		await expect(listBatteries(customer)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(createBattery(customer, BATTERY)).rejects.toMatchObject({ code: 'not_allowed' });
	});
});

describe('what a battery record must say', () => {
	const problemsOf = (changes: object) =>
		batteryInputSchema.safeParse({ ...BATTERY, ...changes }).error?.issues.map(({ path }) => path[0]) ?? [];

	it('quotes the maker, and where it is written, unless the maker is silent', () => {
		const unquoted = { underBonnetWords: '', dataSheet: '' };
		expect(problemsOf({ underBonnet: 'excluded', ...unquoted })).toEqual(['underBonnetWords', 'dataSheet']);
		expect(problemsOf({ underBonnet: 'allowed', ...unquoted })).toEqual(['underBonnetWords', 'dataSheet']);
		expect(problemsOf({ underBonnet: 'silent', ...unquoted })).toEqual([]);
	});

	it('comes back below where it cuts off, on both sides', () => {
		expect(problemsOf({ chargeResetC: 60 })).toEqual(['chargeResetC']);
		expect(problemsOf({ dischargeResetC: 81 })).toEqual(['dischargeResetC']);
	});
});
