import type { Transaction } from 'sequelize';
import { QueryTypes } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../db/connection';
import { AuditEntry } from '../db/models';
import type { AuditAction } from '../presenters/audit';
import { GENESIS, chainHash, type Chained } from './audit-chain';

export type { AuditAction } from '../presenters/audit';
export { findBreak } from './audit-walk';

export interface AuditRecord {
	workshopId: number;
	/** Null when nobody was signed in: a customer by link, or the program itself. */
	personId: number | null;
	action: AuditAction;
	subjectType: string;
	subjectId: number;
	detail?: Record<string, unknown>;
}

type Head = { sequence: number; hash: string };

/** Locks the end of a workshop's chain, which begins with nothing. */
async function lockHead(workshopId: number, transaction: Transaction): Promise<Head> {
	await connection().query(
		'INSERT IGNORE INTO audit_heads (workshop_id, sequence, hash) VALUES (:workshopId, 0, :genesis)',
		{ replacements: { workshopId, genesis: GENESIS }, transaction }
	);
	const [head] = await connection().query<Head>(
		'SELECT sequence, hash FROM audit_heads WHERE workshop_id = :workshopId FOR UPDATE',
		{ replacements: { workshopId }, transaction, type: QueryTypes.SELECT }
	);
	return head ?? { sequence: 0, hash: GENESIS };
}

function chain(entry: AuditRecord, { sequence, hash: previousHash }: Head): Chained & { hash: string } {
	const { workshopId, personId, action, subjectType, subjectId, detail = {} } = entry;
	const chained: Chained = {
		...{ workshopId, sequence: sequence + 1, at: new Date(), personId, action },
		...{ subjectType, subjectId, detail, previousHash }
	};
	return { ...chained, hash: chainHash(chained) };
}

/** Appends entries, all of one workshop, to its chain, inside the transaction whose changes they tell of. */
export async function recordAll(entries: readonly AuditRecord[], transaction: Transaction): Promise<void> {
	const [first] = entries;
	if (!first) return;
	const { workshopId } = first;
	let head: Head = await lockHead(workshopId, transaction);
	const rows = entries.map((entry) => {
		const row = chain(entry, head);
		head = row;
		return row;
	});
	await AuditEntry.bulkCreate(rows, { transaction });
	await connection().query(
		'UPDATE audit_heads SET sequence = :sequence, hash = :hash WHERE workshop_id = :workshopId',
		{ replacements: { sequence: head.sequence, hash: head.hash, workshopId }, transaction }
	);
}

/** Appends one entry. */
export const record = (entry: AuditRecord, transaction: Transaction): Promise<void> =>
	recordAll([entry], transaction);

/** The usual entry: a signed-in person did something in their own workshop. */
export async function recordBy(
	person: SignedInPerson,
	action: AuditAction,
	subject: { type: string; id: number },
	transaction: Transaction,
	detail?: Record<string, unknown>
): Promise<void> {
	await record(
		{
			workshopId: person.workshopId,
			personId: person.id,
			action,
			subjectType: subject.type,
			subjectId: subject.id,
			...(detail ? { detail } : {})
		},
		transaction
	);
}
