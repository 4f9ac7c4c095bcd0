import { QueryTypes } from 'sequelize';
import { connection } from '../../src/lib/server/db/connection';
import { Person, Workshop } from '../../src/lib/server/db/models';
import { today } from '../../src/lib/server/services/days';
import { inventInstallations } from '../../src/lib/server/services/review/invent-installations';
import { rebuildReview } from '../../src/lib/server/services/review/keep-review';
import type { SignedInPerson } from '../../src/lib/schemas/people';

/** The manager of a workshop with so many invented installations, whose review has been made. */
export async function makeInvented(installations: number, seed: number): Promise<SignedInPerson> {
	const tag = `${seed}-${process.pid}-${Date.now().toString(36)}`;
	const name = `Invented ${tag}`;
	const email = `manager-${tag}@shop.example`;
	const manager = { name: 'Invented manager', email, passwordHash: null };
	const { workshopId } = await inventInstallations({ installations, seed, today: today(), name, manager });
	await rebuildReview(workshopId);
	const workshop = await Workshop.findByPk(workshopId);
	const person = await Person.findOne({ where: { workshopId } });
	return {
		...{ id: person!.id, workshopId, workshopName: workshop!.name, customerId: null },
		...{ name: person!.name, email, role: 'manager' }
	};
}

const ORDERS = {
	review_rows: 'installation_id',
	review_months: 'place_id, verdict, fitted_month',
	review_dark_days: 'installation_id, dark_on'
};

/** All that the review keeps of a workshop; sums that have come down to nothing are as good as none. */
export async function readReview(workshopId: number) {
	const read = (table: keyof typeof ORDERS, and = '') =>
		connection().query<Record<string, unknown>>(
			`SELECT * FROM ${table} WHERE workshop_id = :workshopId ${and} ORDER BY ${ORDERS[table]}`,
			{ replacements: { workshopId }, type: QueryTypes.SELECT }
		);
	return {
		rows: await read('review_rows'),
		months: await read('review_months', 'AND installations <> 0'),
		empty: await connection().query(
			`SELECT 1 FROM review_months WHERE workshop_id = :workshopId AND installations = 0
				AND known + never_dark + first_month + m01 + m07 + dark_days + overrides + sheets_waiting + sheets_missing <> 0`,
			{ replacements: { workshopId }, type: QueryTypes.SELECT }
		),
		darkDays: await read('review_dark_days')
	};
}
