import type { Transaction } from 'sequelize';
import type { CustomerInput, CustomerView } from '$lib/schemas/customers';
import type { SignedInPerson } from '$lib/schemas/people';
import { Customer } from '../db/models';
import { inTransaction } from '../db/transaction';
import { notFound } from '../errors';
import { allow } from '../policies';
import { presentCustomer } from '../presenters/customers';
import { recordBy } from './audit';
import { saveVersioned } from './records';

/** The customer of this name and e-mail if the shop knows one, else a new one. A name alone is not enough: two may share it. */
export async function customerFor(
	person: SignedInPerson,
	input: CustomerInput,
	transaction: Transaction
): Promise<number> {
	const { workshopId } = person;
	const { name, email } = input;
	const known = email ? await Customer.findOne({ where: { workshopId, name, email }, transaction }) : null;
	if (known) return known.id;
	const customer = await Customer.create({ ...input, workshopId }, { transaction });
	const subject = { type: 'customer', id: customer.id };
	await recordBy(person, 'customer.created', subject, transaction, { ...input });
	return customer.id;
}

export async function getCustomer(person: SignedInPerson, customerId: number): Promise<CustomerView> {
	allow(person, 'customers.read');
	const customer = await Customer.findOne({ where: { id: customerId, workshopId: person.workshopId } });
	if (!customer) throw notFound('customer');
	return presentCustomer(customer);
}

export async function updateCustomer(
	person: SignedInPerson,
	customerId: number,
	{ version, ...input }: CustomerInput & { version: number }
): Promise<CustomerView> {
	allow(person, 'customers.write');
	return inTransaction(async (transaction) => {
		const where = { id: customerId, workshopId: person.workshopId };
		const customer = await Customer.findOne({ where, transaction });
		if (!customer) throw notFound('customer');
		await saveVersioned(customer, 'customer', version, input, transaction);
		const subject = { type: 'customer', id: customer.id };
		await recordBy(person, 'customer.changed', subject, transaction, { ...input });
		return presentCustomer(customer);
	});
}
