import { describe, expect, it } from 'vitest';
import { newJob } from '../../../../tests/support/records';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { getCustomer, updateCustomer } from './customers';
import { createJob, repeatJob } from './jobs';
import { findVehicles, getVehicle, updateVehicle } from './vehicles';

useTestDatabase();

const missing = { code: 'not_found' };

describe('vehicles that the shop knows', () => {
	it('are found by registration, customer, make or model, the newest first', async () => {
		const { installer } = await makeCrew();
		await createJob(installer, newJob({ registration: 'WREN 42' }));
		await createJob(installer, newJob({ customerName: 'Ben Tolley', registration: 'OWL 7' }));
		const found = async (search: string) =>
			(await findVehicles(installer, search)).map(({ registration }) => registration);
		expect(await found('wren')).toEqual(['WREN 42']);
		expect(await found('tolley')).toEqual(['OWL 7']);
		expect(await found('drover farrow')).toEqual(['OWL 7', 'WREN 42']);
		expect(await found('42 ben')).toEqual([]);
	});

	it('say whose they are, and which job was their last', async () => {
		const { installer } = await makeCrew();
		const { vehicle, customer } = await createJob(installer, newJob());
		await repeatJob(installer, { vehicleId: vehicle.id, note: '' });
		const [found] = await findVehicles(installer, 'farrow');
		expect(found).toEqual({ ...vehicle, customerName: customer.name, lastJobNumber: 2 });
	});

	it('are changed by whoever saw the newest version, and by nobody else', async () => {
		const { installer, engineer } = await makeCrew();
		const { vehicle } = await createJob(installer, newJob());
		const { id, version, customerId: _owner, ...input } = vehicle;
		await updateVehicle(engineer, id, { ...input, towMassKg: 2000, version });
		const late = updateVehicle(installer, id, { ...input, towMassKg: 0, version });
		await expect(late).rejects.toMatchObject({ code: 'changed_meanwhile' });
		expect((await getVehicle(installer, id)).towMassKg).toBe(2000);
	});

	it('of another workshop do not exist', async () => {
		const [ours, theirs] = await Promise.all([makeCrew(), makeCrew()]);
		const { vehicle } = await createJob(theirs.installer, newJob());
		const { id, version, customerId: _owner, ...input } = vehicle;
		await expect(getVehicle(ours.manager, id)).rejects.toMatchObject(missing);
		await expect(updateVehicle(ours.manager, id, { ...input, version })).rejects.toMatchObject(missing);
		expect(await findVehicles(ours.manager, 'farrow')).toEqual([]);
	});
});

describe('customers', () => {
	it('are changed by whoever saw the newest version, and by nobody else', async () => {
		const { installer } = await makeCrew();
		const { customer } = await createJob(installer, newJob());
		const { id, version, ...input } = customer;
		await updateCustomer(installer, id, { ...input, email: 'ana@travellers.example', version });
		const late = updateCustomer(installer, id, { ...input, phone: '00 0000 0303', version });
		await expect(late).rejects.toMatchObject({ code: 'changed_meanwhile' });
		const { email, phone } = await getCustomer(installer, id);
		expect([email, phone]).toEqual(['ana@travellers.example', '']);
	});

	it('of another workshop do not exist', async () => {
		const [ours, theirs] = await Promise.all([makeCrew(), makeCrew()]);
		const { customer } = await createJob(theirs.installer, newJob());
		await expect(getCustomer(ours.manager, customer.id)).rejects.toMatchObject(missing);
		await expect(updateCustomer(ours.manager, customer.id, customer)).rejects.toMatchObject(missing);
	});
});
