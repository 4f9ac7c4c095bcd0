import type { Transaction } from 'sequelize';
import { AuditEntry } from '../db/models';
import { canonicalJson, sha256 } from '../hash';

export const ERASED_ACTION = 'customer.erased';

/** An entry whose detail an erasure took out, with the hash of all that is left of it. */
export interface BlankedEntry {
	sequence: number;
	rest: string;
}

/** Everything of an entry but its detail, which stands for the rest of it once that is gone. */
export function hashOfRest(entry: AuditEntry): string {
	const { workshopId, sequence, at, personId, action, subjectType, subjectId, previousHash, hash } = entry;
	const rest = { workshopId, sequence, personId, action, subjectType, subjectId, previousHash, hash };
	return sha256(canonicalJson({ ...rest, at: at.toISOString() }));
}

/** Every entry that erasures say they took the detail out of; those are entries of the chain themselves. */
export async function readBlanked(
	workshopId: number,
	transaction: Transaction
): Promise<ReadonlyMap<number, string>> {
	const erasures = await AuditEntry.findAll({ where: { workshopId, action: ERASED_ACTION }, transaction });
	const said = erasures.flatMap(({ detail }) => (detail.blanked ?? []) as BlankedEntry[]);
	return new Map(said.map(({ sequence, rest }) => [sequence, rest]));
}

/** Whether an erasure took the detail out, and all the rest is as it was when that erasure said so. */
export const isBlanked = (entry: AuditEntry, blanked: ReadonlyMap<number, string>): boolean =>
	'erasure' in entry.detail && blanked.get(entry.sequence) === hashOfRest(entry);
