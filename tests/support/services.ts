import { afterAll, beforeAll } from 'vitest';
import { closeConnection, connection } from '../../src/lib/server/db/connection';
import { migrate } from '../../src/lib/server/db/migrate';
import { Customer, Person, Workshop, initModels } from '../../src/lib/server/db/models';
import { stopReruns } from '../../src/lib/server/services/reruns/run-reruns';
import { ROLES, type Role, type SignedInPerson } from '../../src/lib/schemas/people';

/** Connects to the database of this run before the tests of a file, with its tables up to date, and leaves it after. */
export function useTestDatabase(): void {
	beforeAll(async () => {
		// A test that wants what a book lets be assessed again asks for it.
		await stopReruns();
		const sequelize = connection();
		initModels(sequelize);
		await migrate(sequelize);
	});
	afterAll(async () => {
		await stopReruns();
		await closeConnection();
	});
}

export type Crew = Record<Role, SignedInPerson> & { workshopId: number };

let made = 0;

/** A workshop of its own with one person of each role, so that tests never meet each other's rows. */
export async function makeCrew(): Promise<Crew> {
	const tag = `${Date.now().toString(36)}-${process.pid}-${made++}`;
	const workshop = await Workshop.create({ name: `Shop ${tag}` });
	const customer = await Customer.create({ workshopId: workshop.id, name: `Customer ${tag}` });
	const people = await Promise.all(
		ROLES.map(async (role) => {
			const customerId = role === 'customer' ? customer.id : null;
			const email = `${role}-${tag}@shop.example`;
			const person = await Person.create({
				workshopId: workshop.id,
				customerId,
				name: `${role} ${tag}`,
				email,
				role
			});
			const { id, name } = person;
			return [
				role,
				{ id, workshopId: workshop.id, workshopName: workshop.name, customerId, name, email, role }
			];
		})
	);
	return { ...(Object.fromEntries(people) as Record<Role, SignedInPerson>), workshopId: workshop.id };
}
