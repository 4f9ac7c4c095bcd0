import { Op, QueryTypes, type Transaction } from 'sequelize';
import { connection } from '../db/connection';
import { AuditEntry } from '../db/models';
import { inTransaction } from '../db/transaction';
import { GENESIS, chainHash } from './audit-chain';
import { isBlanked, readBlanked } from './audit-erased';

const BATCH = 1_000;

/** What a walk along a workshop's chain came to. */
export interface Walk {
	entries: number;
	/** Of its last entry. */
	headHash: string;
	/** The first thing that is wrong, or null when it is whole to its head. */
	finding: string | null;
	/** The hash of the entry that was asked about, if the chain has it. */
	hashAt: string | null;
}

async function* readEntries(workshopId: number, transaction: Transaction): AsyncGenerator<AuditEntry> {
	for (let after = 0; ;) {
		const batch = await AuditEntry.findAll({
			where: { workshopId, sequence: { [Op.gt]: after } },
			order: [['sequence', 'ASC']],
			limit: BATCH,
			transaction
		});
		yield* batch;
		if (batch.length < BATCH) return;
		after = batch.at(-1)!.sequence;
	}
}

function findWrong(
	entry: AuditEntry,
	place: number,
	previousHash: string,
	blanked: ReadonlyMap<number, string>
): string | null {
	const { workshopId, sequence, at, personId, action, subjectType, subjectId, detail, hash } = entry;
	if (sequence !== place) return `entry ${place} is missing`;
	if (entry.previousHash !== previousHash) return `entry ${sequence} does not follow the one before it`;
	const chained = {
		workshopId,
		sequence,
		at,
		personId,
		action,
		subjectType,
		subjectId,
		detail,
		previousHash
	};
	if (isBlanked(entry, blanked)) return null;
	return chainHash(chained) === hash ? null : `entry ${sequence} was changed`;
}

async function findCut({ entries, headHash }: Walk, workshopId: number, transaction: Transaction) {
	const [head] = await connection().query<{ sequence: number; hash: string }>(
		'SELECT sequence, hash FROM audit_heads WHERE workshop_id = :workshopId',
		{ replacements: { workshopId }, type: QueryTypes.SELECT, transaction }
	);
	if (!head) return entries === 0 ? null : 'the head of the trail is missing';
	const isWhole = head.sequence === entries && head.hash === headHash;
	return isWhole ? null : 'the end of the trail is cut off';
}

/** Walks a workshop's chain from its first entry to its head, in one view of the database, and stops at what is wrong. */
export function walkTrail(workshopId: number, asked = 0): Promise<Walk> {
	return inTransaction(async (transaction) => {
		const walk: Walk = { entries: 0, headHash: GENESIS, finding: null, hashAt: null };
		const blanked = await readBlanked(workshopId, transaction);
		for await (const entry of readEntries(workshopId, transaction)) {
			const finding = findWrong(entry, walk.entries + 1, walk.headHash, blanked);
			if (finding) return { ...walk, finding };
			walk.entries = entry.sequence;
			walk.headHash = entry.hash;
			if (entry.sequence === asked) walk.hashAt = entry.hash;
		}
		return { ...walk, finding: await findCut(walk, workshopId, transaction) };
	});
}

/** Where a workshop's chain first fails, or null when it is whole to its head. */
export const findBreak = async (workshopId: number): Promise<string | null> =>
	(await walkTrail(workshopId)).finding;
