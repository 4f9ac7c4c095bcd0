import { Op, type Transaction } from 'sequelize';
import type { CustomerInput, CustomerView } from '$lib/schemas/customers';
import type { SignedInPerson } from '$lib/schemas/people';
import { Customer } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { presentCustomer } from '../presenters/customers';
import { recordBy } from './audit';
import { saveVersioned } from './records';

/**
 * The customer of this e-mail if the shop knows one, else a new one. Whoever reads that mail is one person here: they sign
 * in by it, and see and have deleted all that is theirs. A name alone is not enough, and another name is asked about.
 */
export async function customerFor(
	person: SignedInPerson,
	input: CustomerInput,
	transaction: Transaction
): Promise<number> {
	const { workshopId } = person;
	const { name, email } = input;
	const known = email ? await Customer.findOne({ where: { workshopId, email }, transaction }) : null;
	if (known && known.name !== name) {
		const message = `${known.name} is the customer of this e-mail: write the name so, or leave the e-mail out.`;
		throw new AppError('conflict', message, [{ path: 'customerEmail', message }]);
	}
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

async function refuseTakenEmail(
	{ id, workshopId }: Customer,
	email: string,
	transaction: Transaction
): Promise<void> {
	if (email === '') return;
	const other = await Customer.findOne({ where: { workshopId, email, id: { [Op.ne]: id } }, transaction });
	if (!other) return;
	const message = `Another customer has this e-mail: ${other.name}. An e-mail is one customer’s, who signs in with it.`;
	throw new AppError('conflict', message, [{ path: 'email', message }]);
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
		await refuseTakenEmail(customer, input.email, transaction);
		await saveVersioned(customer, 'customer', version, input, transaction);
		const subject = { type: 'customer', id: customer.id };
		await recordBy(person, 'customer.changed', subject, transaction, { ...input });
		return presentCustomer(customer);
	});
}
