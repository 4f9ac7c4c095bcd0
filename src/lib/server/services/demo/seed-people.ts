import type { Transaction } from 'sequelize';
import type { Role, SignedInPerson } from '$lib/schemas/people';
import people from '../../../../../seeds/demo-people.json';
import workshops from '../../../../../seeds/demo-workshops.json';
import { hashPassword } from '../../auth/passwords';
import { Customer, Person, Workshop } from '../../db/models';

/** A seeded workshop and its staff; the first of them is its manager. */
export interface Crew {
	key: string;
	workshopId: number;
	manager: SignedInPerson;
	staff: SignedInPerson[];
}

type DemoPerson = (typeof people)[number];

const isCustomer = ({ role }: DemoPerson): boolean => role === 'customer';

async function seedPerson(
	{ name, email, password, ...person }: DemoPerson,
	{ id: workshopId, name: workshopName }: Pick<Workshop, 'id' | 'name'>,
	customerId: number | null,
	transaction: Transaction
): Promise<SignedInPerson> {
	const role = person.role as Role;
	const passwordHash = await hashPassword(password);
	const row = { workshopId, customerId, name, email, role, passwordHash };
	const { id } = await Person.create(row, { transaction });
	return { id, workshopId, workshopName, customerId, name, email, role };
}

/** The workshops and who works there. */
export async function seedCrews(transaction: Transaction): Promise<Crew[]> {
	const crews: Crew[] = [];
	for (const { key, ...shop } of workshops) {
		const workshop = await Workshop.create(shop, { transaction });
		const staff: SignedInPerson[] = [];
		for (const person of people.filter((each) => each.workshop === key && !isCustomer(each))) {
			staff.push(await seedPerson(person, workshop, null, transaction));
		}
		const manager = staff.find(({ role }) => role === 'manager');
		if (!manager) throw new Error(`The demo workshop ${key} has no manager.`);
		crews.push({ key, workshopId: workshop.id, manager, staff });
	}
	return crews;
}

/** Customers who sign in: those of the demo people whose job is there by now. */
export async function seedCustomerSignIns(
	{ key, workshopId }: Crew,
	transaction: Transaction
): Promise<void> {
	const workshop = await Workshop.findByPk(workshopId, { transaction });
	for (const person of people.filter((each) => each.workshop === key && isCustomer(each))) {
		const customer = await Customer.findOne({ where: { workshopId, email: person.email }, transaction });
		if (!workshop || !customer) throw new Error(`The demo has no job for ${person.name}.`);
		await seedPerson(person, workshop, customer.id, transaction);
	}
}
