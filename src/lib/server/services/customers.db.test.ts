import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { newJob } from '../../../../tests/support/records';
import { updateCustomer } from './customers';
import { createJob } from './jobs';

useTestDatabase();

describe('a customer', () => {
	it('is known by their e-mail, and another name with it is asked about', async () => {
		const { installer, workshopId } = await makeCrew();
		const email = `ilse.${workshopId}@travellers.example`;
		const first = await createJob(installer, {
			...newJob(),
			customerName: 'Ilse Tarn',
			customerEmail: email
		});
		const again = { ...newJob(), customerName: 'Ilse Tarn', customerEmail: email };
		expect((await createJob(installer, again)).customer.id).toBe(first.customer.id);
		const other = createJob(installer, { ...again, customerName: 'I. Tarn' });
		await expect(other).rejects.toMatchObject({ code: 'conflict', problems: [{ path: 'customerEmail' }] });
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
