import type { Transaction } from 'sequelize';
import type { Role, SignedInPerson } from '$lib/schemas/people';
import people from '../../../../../seeds/demo-people.json';
import workshops from '../../../../../seeds/demo-workshops.json';
import { hashPassword } from '../../auth/passwords';
import { Customer, Person, Workshop } from '../../db/models';

/** A seeded workshop and its people, by role. */
export interface Crew {
	key: string;
	workshopId: number;
	manager: SignedInPerson;
	people: SignedInPerson[];
}

async function customerIdOf(workshopId: number, person: (typeof people)[number], transaction: Transaction) {
	if (!person.customer) return null;
	const { email } = person;
	const customer = await Customer.create(
		{ workshopId, name: person.customer, email, phone: '' },
		{ transaction }
	);
	return customer.id;
}

async function seedCrew(
	{ key, ...shop }: (typeof workshops)[number],
	transaction: Transaction
): Promise<Crew> {
	const workshop = await Workshop.create(shop, { transaction });
	const seeded: SignedInPerson[] = [];
	for (const person of people.filter((each) => each.workshop === key)) {
		const { name, email, password } = person;
		const role = person.role as Role;
		const customerId = await customerIdOf(workshop.id, person, transaction);
		const passwordHash = await hashPassword(password);
		const row = await Person.create(
			{ workshopId: workshop.id, customerId, name, email, role, passwordHash },
			{ transaction }
		);
		seeded.push({
			id: row.id,
			workshopId: workshop.id,
			workshopName: workshop.name,
			customerId,
			name,
			email,
			role
		});
	}
	const manager = seeded.find((each) => each.role === 'manager');
	if (!manager) throw new Error(`The demo workshop ${key} has no manager.`);
	return { key, workshopId: workshop.id, manager, people: seeded };
}

export async function seedPeople(transaction: Transaction): Promise<Crew[]> {
	const crews: Crew[] = [];
	for (const shop of workshops) crews.push(await seedCrew(shop, transaction));
	return crews;
}
