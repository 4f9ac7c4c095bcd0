import { Workshop } from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { seedPeople } from './seed-people';
import { seedPlaces } from './seed-places';

/** Fills an empty database with the invented workshops, all of it or nothing. */
export async function seedDemo(): Promise<string> {
	if ((await Workshop.count()) > 0) return 'there already';
	return inTransaction(async (transaction) => {
		const crews = await seedPeople(transaction);
		for (const crew of crews) await seedPlaces(crew);
		return `${crews.length} workshops`;
	});
}
