import { connection } from '../../db/connection';
import { Workshop } from '../../db/models';
import { withNamedLock } from '../../db/named-lock';
import { inTransaction } from '../../db/transaction';
import { seedBooks } from './seed-books';
import { seedJobs } from './seed-jobs';
import { seedCrews, seedCustomerSignIns } from './seed-people';
import { seedShelves } from './seed-shelves';
import { seedTraces } from './seed-traces';

/** Puts the invented workshops in, all of them or nothing, and says how many jobs that makes. */
export async function fillWithDemo(): Promise<number> {
	return inTransaction(async (transaction) => {
		let jobs = 0;
		for (const crew of await seedCrews(transaction)) {
			await seedShelves(crew, transaction);
			jobs += await seedJobs(crew, transaction);
			await seedCustomerSignIns(crew, transaction);
			await seedBooks(crew);
			await seedTraces(crew, transaction);
		}
		return jobs;
	});
}

/** Only an empty database gets the demo, and of several processes that start together one fills it. */
export async function seedDemo(): Promise<string> {
	return withNamedLock(connection(), 'demo data', async () => {
		if ((await Workshop.count()) > 0) return 'there already';
		return `${await fillWithDemo()} jobs`;
	});
}
