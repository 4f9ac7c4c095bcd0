import type { Transaction } from 'sequelize';
import { QueryTypes } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../db/connection';
import { AuditEntry } from '../db/models';
import { canonicalJson, sha256 } from '../hash';

const GENESIS = '0'.repeat(64);

export interface AuditRecord {
	workshopId: number;
	/** Null when nobody was signed in: a customer by link, or the program itself. */
	personId: number | null;
	action: string;
	subjectType: string;
	subjectId: number;
	detail?: Record<string, unknown>;
}

interface Chained {
	workshopId: number;
	sequence: number;
	at: Date;
	personId: number | null;
	action: string;
	subjectType: string;
	subjectId: number;
	detail: Record<string, unknown>;
	previousHash: string;
}

function chainHash(entry: Chained): string {
	return sha256(canonicalJson({ ...entry, at: entry.at.toISOString() }));
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

/** Walks a workshop's chain; says where it first fails, or null when it is whole to its head. */
export async function findBreak(workshopId: number): Promise<string | null> {
	const entries = await AuditEntry.findAll({ where: { workshopId }, order: [['sequence', 'ASC']] });
	let previousHash = GENESIS;
	for (const [index, entry] of entries.entries()) {
		const { sequence, at, personId, action, subjectType, subjectId, detail, hash } = entry;
		if (sequence !== index + 1) return `entry ${index + 1} is missing`;
		if (entry.previousHash !== previousHash) return `entry ${sequence} does not follow the one before it`;
		const expected = chainHash({
			...{ workshopId, sequence, at, personId, action, subjectType, subjectId, detail },
			previousHash
		});
		if (expected !== hash) return `entry ${sequence} was changed`;
		previousHash = hash;
	}
	const [head] = await connection().query<{ sequence: number; hash: string }>(
		'SELECT sequence, hash FROM audit_heads WHERE workshop_id = :workshopId',
		{ replacements: { workshopId }, type: QueryTypes.SELECT }
	);
	if (head && (head.sequence !== entries.length || head.hash !== previousHash))
		return 'the end of the trail is cut off';
	return null;
}
