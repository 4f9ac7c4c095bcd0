import { describe, expect, it } from 'vitest';
import { batteryInputSchema } from '$lib/schemas/batteries';
import { AGM_BATTERY, BATTERY } from '../../../../tests/support/records';
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

	it('of a battery without a BMS come back with the limits of its maker, and no cut-off', async () => {
		const { installer } = await makeCrew();
		const { id } = await createBattery(installer, AGM_BATTERY);
		const view = await getBattery(installer, id);
		expect(view).toMatchObject({ chemistry: 'lead-acid-agm', highestChargeC: 50, highestUseC: 60 });
		expect(view).toMatchObject({ ratedLifeYears: 6, compensatesCharge: false });
		expect(view).toMatchObject({ sensor: null, dischargeCutC: null, cutDelayS: null, autoReset: null });
	});

	it('lose what their new chemistry does not have', async () => {
		const { installer } = await makeCrew();
		const { id, version } = await createBattery(installer, BATTERY);
		await updateBattery(installer, id, { ...AGM_BATTERY, version });
		expect(await getBattery(installer, id)).toMatchObject({
			sensor: null,
			chargeCutC: null,
			highestUseC: 60
		});
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

	it('has the fields of its chemistry, and keeps no others', () => {
		const { highestUseC: _use, sensor: _sensor, ...neither } = { ...BATTERY, ...AGM_BATTERY };
		const missing = (chemistry: string) =>
			batteryInputSchema
				.safeParse({ ...neither, chemistry, chargeCutC: 60, chargeResetC: 50 })
				.error?.issues.map(({ message }) => message);
		expect(missing('lead-acid-flooded')).toEqual(['Highest temperature for use is missing.']);
		expect(missing('lithium-titanate')).toEqual([
			'What the BMS measures is missing.',
			'Goes dark at is missing.',
			'Comes back at is missing.',
			'Delay before a cut-off is missing.',
			'Comes back by itself is missing.'
		]);
		const kept = batteryInputSchema.parse({ ...BATTERY, ...AGM_BATTERY, sensor: 'cells', dischargeCutC: 75 });
		expect(kept).toMatchObject({ sensor: null, dischargeCutC: null, highestUseC: 60 });
	});

	it('says what is missing together with whatever else is wrong', () => {
		expect(problemsOf({ maker: '', sensor: null })).toEqual(['maker', 'sensor']);
		expect(problemsOf({ chemistry: 'zinc-air', sensor: null })).toEqual(['chemistry']);
	});

	it('is not charged hotter than it may be used', () => {
		const check = (highestChargeC: number) =>
			batteryInputSchema.safeParse({ ...AGM_BATTERY, highestChargeC }).error?.issues[0]?.message;
		expect(check(61)).toBe(
			'Highest temperature for charging must be at most 60 °C, the highest for any use.'
		);
		expect(check(60)).toBeUndefined();
	});

	it('comes back below where it cuts off, on both sides', () => {
		expect(problemsOf({ chargeResetC: 60 })).toEqual(['chargeResetC']);
		expect(problemsOf({ dischargeResetC: 81 })).toEqual(['dischargeResetC']);
	});
});
