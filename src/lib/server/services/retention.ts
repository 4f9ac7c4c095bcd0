import { Op, QueryTypes } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import type { RetainedCustomer, RetentionInput, RetentionView } from '$lib/schemas/retention';
import { connection } from '../db/connection';
import { Customer, Erasure, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { notFound } from '../errors';
import { allow } from '../policies';
import { recordBy } from './audit';
import { addMonths, today } from './days';
import { saveVersioned } from './records';

type Years = RetentionView['years'];
const MOST_LISTED = 200;

/** The last change of a customer: of their jobs, or of themselves where they have none. */
const AGED = `
	SELECT c.id, c.name, COUNT(j.id) AS jobs,
		DATE_FORMAT(COALESCE(MAX(j.updated_at), c.updated_at), '%Y-%m-%d') AS lastChangedOn
	FROM customers c LEFT JOIN jobs j ON j.customer_id = c.id
	WHERE c.workshop_id = :workshopId
		AND NOT EXISTS (SELECT 1 FROM erasures e WHERE e.customer_id = c.id AND e.state = 'granted')
	GROUP BY c.id, c.name, c.updated_at
	HAVING lastChangedOn < :before
	ORDER BY lastChangedOn, c.id
`;

/** Whose data a rule of so many years reaches on a day, the oldest first. */
export async function findAged(workshopId: number, years: Years, now = today()): Promise<RetainedCustomer[]> {
	if (years === null) return [];
	const before = addMonths(now, -12 * years);
	return connection().query<RetainedCustomer>(AGED, {
		replacements: { workshopId, before },
		type: QueryTypes.SELECT
	});
}

/** What waits or was granted; a refusal holds for a year, for its reason may be over by then. */
const stillAnswers = (now: string) => ({
	[Op.or]: [
		{ state: { [Op.notIn]: ['refused', 'withdrawn'] } },
		{ decidedAt: { [Op.gte]: new Date(`${addMonths(now, -12)}T00:00:00Z`) } }
	]
});

/**
 * Puts those whom the rule of their shop reaches on the list of requests, once each, or again a year after a refusal or after one was taken back; a manager decides there. Nothing is
 * deleted unseen: a customer who calls after years may still have a battery under warranty. Says how many are new.
 */
export async function askForAged(now = today()): Promise<number> {
	const workshops = await Workshop.findAll({ where: { retentionYears: { [Op.ne]: null } } });
	let asked = 0;
	for (const { id: workshopId, retentionYears } of workshops) {
		const aged = await findAged(workshopId, (retentionYears ?? null) as Years, now);
		asked += await inTransaction(async (transaction) => {
			const ids = aged.map(({ id }) => id);
			const held = {
				where: { id: ids },
				order: [['id', 'ASC']] as [string, string][],
				transaction,
				lock: true
			};
			await Customer.findAll(held);
			const before = await Erasure.findAll({ where: { customerId: ids, ...stillAnswers(now) }, transaction });
			const known = new Set(before.map(({ customerId }) => customerId));
			const rows = ids.filter((id) => !known.has(id)).map((customerId) => ({ workshopId, customerId }));
			await Erasure.bulkCreate(rows, { transaction });
			return rows.length;
		});
	}
	return asked;
}

async function findWorkshop({ workshopId }: SignedInPerson): Promise<Workshop> {
	const workshop = await Workshop.findByPk(workshopId);
	if (!workshop) throw notFound('workshop');
	return workshop;
}

async function show(
	{ id, retentionYears, version }: Workshop,
	asked: Years | undefined
): Promise<RetentionView> {
	const years = (retentionYears ?? null) as Years;
	const shown = asked === undefined ? years : asked;
	const aged = await findAged(id, shown);
	const preview = { years: shown, total: aged.length, customers: aged.slice(0, MOST_LISTED) };
	return { years, version, preview };
}

/** How long the shop keeps customers' data, and whom that reaches; or whom other years would reach. */
export async function getRetention(person: SignedInPerson, asked?: Years): Promise<RetentionView> {
	allow(person, 'shop.write');
	return show(await findWorkshop(person), asked);
}

export async function saveRetention(
	person: SignedInPerson,
	{ years, version }: RetentionInput
): Promise<RetentionView> {
	allow(person, 'shop.write');
	return inTransaction(async (transaction) => {
		const workshop = await findWorkshop(person);
		await saveVersioned(workshop, 'shop', version, { retentionYears: years }, transaction);
		const subject = { type: 'workshop', id: workshop.id };
		await recordBy(person, 'shop.retention-changed', subject, transaction, { years });
		return show(workshop, undefined);
	});
}
