import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { newJob } from '../../../../tests/support/records';
import { updateCustomer } from './customers';
import { createJob } from './jobs';

useTestDatabase();

describe('a customer', () => {
	it('is known by their e-mail, however their name was written', async () => {
		const { installer, workshopId } = await makeCrew();
		const email = `ilse.${workshopId}@travellers.example`;
		const first = await createJob(installer, {
			...newJob(),
			customerName: 'Ilse Tarn',
			customerEmail: email
		});
		const second = await createJob(installer, { ...newJob(), customerName: 'I. Tarn', customerEmail: email });
		expect(second.customer.id).toBe(first.customer.id);
		const nameless = await createJob(installer, { ...newJob(), customerName: 'Ilse Tarn' });
		expect(nameless.customer.id).not.toBe(first.customer.id);
	});

	it('does not take the e-mail of another', async () => {
		const { installer, workshopId } = await makeCrew();
		const email = `ilse.${workshopId}@travellers.example`;
		await createJob(installer, { ...newJob(), customerName: 'Ilse Tarn', customerEmail: email });
		const { customer } = await createJob(installer, { ...newJob(), customerName: 'Odo Tarn' });
		const { id, name, version } = customer;
		const change = updateCustomer(installer, id, { name, email, phone: '', version });
		await expect(change).rejects.toMatchObject({ code: 'conflict', problems: [{ path: 'email' }] });
	});
});
