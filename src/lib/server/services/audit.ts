import type { Transaction } from 'sequelize';
import { QueryTypes } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../db/connection';
import { AuditEntry } from '../db/models';
import { GENESIS, chainHash, type Chained } from './audit-chain';

export { findBreak } from './audit-walk';

export interface AuditRecord {
	workshopId: number;
	/** Null when nobody was signed in: a customer by link, or the program itself. */
	personId: number | null;
	action: string;
	subjectType: string;
	subjectId: number;
	detail?: Record<string, unknown>;
}

/** Appends one entry to the workshop's chain, inside the transaction whose change it tells of. */
export async function record(entry: AuditRecord, transaction: Transaction): Promise<void> {
	const { workshopId } = entry;
	await connection().query(
		'INSERT IGNORE INTO audit_heads (workshop_id, sequence, hash) VALUES (:workshopId, 0, :genesis)',
		{ replacements: { workshopId, genesis: GENESIS }, transaction }
	);
	const [head] = await connection().query<{ sequence: number; hash: string }>(
		'SELECT sequence, hash FROM audit_heads WHERE workshop_id = :workshopId FOR UPDATE',
		{ replacements: { workshopId }, transaction, type: QueryTypes.SELECT }
	);
	const chained: Chained = {
		workshopId,
		sequence: (head?.sequence ?? 0) + 1,
		at: new Date(),
		personId: entry.personId,
		action: entry.action,
		subjectType: entry.subjectType,
		subjectId: entry.subjectId,
		detail: entry.detail ?? {},
		previousHash: head?.hash ?? GENESIS
	};
	const hash = chainHash(chained);
	await AuditEntry.create({ ...chained, hash }, { transaction });
	await connection().query(
		'UPDATE audit_heads SET sequence = :sequence, hash = :hash WHERE workshop_id = :workshopId',
		{
			replacements: { sequence: chained.sequence, hash, workshopId },
			transaction
		}
	);
}

/** The usual entry: a signed-in person did something in their own workshop. */
export async function recordBy(
	person: SignedInPerson,
	action: string,
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
