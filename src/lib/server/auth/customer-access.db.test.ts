import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { makeSentSheet } from '../../../../tests/support/sheets';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { AuditEntry, Customer, Job, Person, Sheet, Vehicle } from '../db/models';
import { inTransaction } from '../db/transaction';
import { findBreak } from '../services/audit';
import { listMyVehicles } from '../services/my-vehicles';
import { findAddressee } from './customer-access';
import { openSession, personOfSession } from './sessions';

useTestDatabase();

const LONG_MS = 60_000;
const newAddress = (): string => `ilse.${randomUUID().slice(0, 8)}@travellers.example`;
const ask = (email: string) => inTransaction((transaction) => findAddressee(email, transaction));

/** A customer of a shop, with a page that was sent to them, who has never signed in. */
async function makeReader() {
	const { crew, jobId, sheet } = await makeSentSheet('cool');
	const email = newAddress();
	const customer = await Customer.create({ workshopId: crew.workshopId, name: 'Ilse Tarn', email });
	await Job.update({ customerId: customer.id }, { where: { id: jobId } });
	const { vehicleId } = (await Job.findByPk(jobId))!;
	await Vehicle.update({ customerId: customer.id }, { where: { id: vehicleId } });
	return { crew, email, customer, sheet };
}

describe('a customer who was sent a page', () => {
	it('gets a sign-in of their own when they first ask for a link, once', { timeout: LONG_MS }, async () => {
		const { crew, email, customer, sheet } = await makeReader();
		const person = (await ask(email))!;
		expect(person).toMatchObject({ customerId: customer.id, role: 'customer', name: 'Ilse Tarn', email });
		expect((await ask(email))!.id).toBe(person.id);
		expect(await Person.count({ where: { customerId: customer.id } })).toBe(1);
		const signedIn = (await personOfSession(await openSession(person.id)))!;
		const documents = (await listMyVehicles(signedIn)).flatMap((vehicle) => vehicle.documents);
		expect(documents.map(({ href }) => href)).toContain(`/my/${sheet.id}`);
		const told = { workshopId: crew.workshopId, action: 'customer.admitted' };
		expect(await AuditEntry.count({ where: told })).toBe(1);
		expect(await findBreak(crew.workshopId)).toBeNull();
	});

	it(
		'signs in under the address that the shop has of them, and under no older one',
		{ timeout: LONG_MS },
		async () => {
			const { email, customer } = await makeReader();
			const person = (await ask(email))!;
			const secret = await openSession(person.id);
			const moved = newAddress();
			await customer.update({ email: moved });
			expect(await ask(email)).toBeNull();
			expect(await ask(moved)).toMatchObject({ id: person.id, email: moved });
			expect(await personOfSession(secret)).toBeNull();
		}
	);

	it(
		'is nobody when the page was taken back before, or their access has ended',
		{ timeout: LONG_MS },
		async () => {
			const { email, sheet } = await makeReader();
			await Sheet.update({ withdrawnAt: new Date() }, { where: { id: sheet.id } });
			expect(await ask(email)).toBeNull();
			await Sheet.update({ withdrawnAt: null }, { where: { id: sheet.id } });
			const person = (await ask(email))!;
			await person.update({ active: false });
			expect(await ask(email)).toBeNull();
		}
	);
});

describe('nobody is let in', () => {
	it('who is a customer without a page, or no customer', async () => {
		const { workshopId } = await makeCrew();
		const email = newAddress();
		await Customer.create({ workshopId, name: 'Ilse Tarn', email });
		expect(await ask(email)).toBeNull();
		expect(await ask(newAddress())).toBeNull();
		expect(await Person.count({ where: { email } })).toBe(0);
	});
});
