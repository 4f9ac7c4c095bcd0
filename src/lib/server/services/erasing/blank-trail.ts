import { Op, QueryTypes, type Transaction } from 'sequelize';
import { connection } from '../../db/connection';
import { AuditEntry } from '../../db/models';
import { canonicalJson } from '../../hash';
import { ERASED_ACTION, hashOfRest, type BlankedEntry } from '../audit-erased';
import type { Persona } from './find-persona';

async function findNaming({ workshopId, terms }: Persona, transaction: Transaction): Promise<number[]> {
	const found: number[] = [];
	for (const term of terms) {
		// As the text of JSON writes it.
		const written = JSON.stringify(term).slice(1, -1);
		const rows = await connection().query<{ id: number }>(
			'SELECT id FROM audit_entries WHERE workshop_id = :workshopId AND LOCATE(:written, detail) > 0',
			{ replacements: { workshopId, written }, type: QueryTypes.SELECT, transaction }
		);
		found.push(...rows.map(({ id }) => id));
	}
	return found;
}

const of = (subjectType: string, subjectId: number[]) => ({ subjectType, subjectId });

/** Entries about their own records in which people wrote a part of a name: "Ms Tarn wants it there". */
async function findFreelyNaming(
	{ workshopId, ids, recommendationIds, scrub }: Persona,
	transaction: Transaction
): Promise<AuditEntry[]> {
	const own = [of('job', ids.jobs), of('mount', ids.mounts), of('sheet', ids.sheets)];
	const entries = await AuditEntry.findAll({
		where: { workshopId, [Op.or]: [...own, of('recommendation', recommendationIds)] },
		transaction
	});
	return entries.filter(({ detail }) => canonicalJson(scrub.freeJson(detail)) !== canonicalJson(detail));
}

/**
 * Takes the detail out of every entry of the trail that names a person or tells what they were called. What stays (who
 * did what to which record, when, and the hashes) is hashed into the entry of the erasure itself, which comes after: so
 * the chain is whole, and nobody else can take out a detail and call it an erasure.
 */
export async function blankTrail(
	persona: Persona,
	erasureId: number,
	transaction: Transaction
): Promise<BlankedEntry[]> {
	const { workshopId, customer, ids } = persona;
	const tellingOfTheirs = await findFreelyNaming(persona, transaction);
	const entries = await AuditEntry.findAll({
		where: {
			workshopId,
			[Op.or]: [
				of('customer', [customer.id]),
				of('vehicle', ids.vehicles),
				of('person', ids.people),
				{ ...of('job', ids.jobs), action: 'job.created' },
				{ id: tellingOfTheirs.map(({ id }) => id) },
				{ id: await findNaming(persona, transaction) }
			]
		},
		order: [['sequence', 'ASC']],
		transaction
	});
	const isTelling = ({ action, detail }: AuditEntry): boolean =>
		action !== ERASED_ACTION && Object.keys(detail).length > 0 && !('erasure' in detail);
	const telling = entries.filter(isTelling);
	for (const entry of telling) await entry.update({ detail: { erasure: erasureId } }, { transaction });
	return telling.map((entry) => ({ sequence: entry.sequence, rest: hashOfRest(entry) }));
}
