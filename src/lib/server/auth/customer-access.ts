import { Op, type Transaction } from 'sequelize';
import { Customer, Job, Person, Sheet } from '../db/models';
import { record } from '../services/audit';
import { endSessions } from './sessions';

/** The customer at an address whom a shop has sent a page, of several the one who got the latest. */
async function findCustomerSentTo(email: string, transaction: Transaction): Promise<Customer | null> {
	const customers = await Customer.findAll({ where: { email }, transaction });
	if (customers.length === 0) return null;
	const where = { customerId: { [Op.in]: customers.map(({ id }) => id) } };
	const jobs = await Job.findAll({ where, attributes: ['id', 'customerId'], transaction });
	const latest = await Sheet.findOne({
		where: { jobId: jobs.map(({ id }) => id), withdrawnAt: null },
		attributes: ['jobId'],
		order: [['id', 'DESC']],
		transaction
	});
	const job = jobs.find(({ id }) => id === latest?.jobId);
	return customers.find(({ id }) => id === job?.customerId) ?? null;
}

/** A customer's sign-in goes with the address that the shop has of them: whoever reads the old one is out at once. */
async function moveTo(person: Person, email: string, transaction: Transaction): Promise<Person> {
	await endSessions(person.id, 'signed-out', transaction);
	return person.update({ email }, { transaction });
}

async function admit({ id, workshopId, name, email }: Customer, transaction: Transaction): Promise<Person> {
	const row = { workshopId, customerId: id, name, email, role: 'customer' as const };
	const person = await Person.create(row, { transaction });
	const subject = { subjectType: 'person', subjectId: person.id };
	await record({ workshopId, personId: person.id, action: 'customer.admitted', ...subject }, transaction);
	return person;
}

const isStill = async ({ customerId }: Person, email: string, transaction: Transaction): Promise<boolean> =>
	(await Customer.count({ where: { id: customerId!, email }, transaction })) > 0;

/**
 * Who may sign in by a letter to an address: somebody of a shop, or a customer who was sent a page, for whom the sign-in
 * is made when they first ask for it. Nobody else, and nobody who has left.
 */
export async function findAddressee(email: string, transaction: Transaction): Promise<Person | null> {
	const known = await Person.findOne({ where: { email }, transaction, lock: transaction.LOCK.UPDATE });
	if (known?.active === false) return null;
	if (known) return known.customerId === null || (await isStill(known, email, transaction)) ? known : null;
	const customer = await findCustomerSentTo(email, transaction);
	if (!customer) return null;
	const person = await Person.findOne({ where: { customerId: customer.id }, transaction });
	if (!person) return admit(customer, transaction);
	return person.active ? moveTo(person, email, transaction) : null;
}
