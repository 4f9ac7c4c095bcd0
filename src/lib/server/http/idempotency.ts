import { QueryTypes } from 'sequelize';
import { connection } from '../db/connection';
import { databaseErrorNumber, inTransaction } from '../db/transaction';
import { AppError } from '../errors';
import { sha256 } from '../hash';

export interface StoredAnswer {
	status: number;
	body: string;
}

const DUPLICATE_ENTRY = 1062;
const KEY = /^[\x21-\x7e]{1,120}$/;

async function readStored(
	personId: number,
	key: string
): Promise<{ request: string; answer: StoredAnswer } | null> {
	const [row] = await connection().query<{ request: string; status: number; body: string }>(
		`SELECT request_sha256 AS request, status, response AS body FROM idempotency_keys
		 WHERE person_id = :personId AND idempotency_key = :key`,
		{ replacements: { personId, key }, type: QueryTypes.SELECT }
	);
	return row ? { request: row.request, answer: { status: row.status, body: row.body } } : null;
}

function requireKey(key: string): void {
	if (KEY.test(key)) return;
	throw new AppError(
		'malformed_request',
		'Idempotency-Key must be 1 to 120 printable characters without spaces.'
	);
}

interface Asked {
	personId: number;
	key: string;
	request: string;
}

/** What was answered to this question under this key; null when it is new. */
export async function findAnswer({ personId, key, request }: Asked): Promise<StoredAnswer | null> {
	requireKey(key);
	const stored = await readStored(personId, key);
	if (!stored) return null;
	if (stored.request === sha256(request)) return stored.answer;
	throw new AppError(
		'idempotency_key_reused',
		'This Idempotency-Key was used for a different request before.'
	);
}

/**
 * Does the work once for a key, however often and however parallel it is asked: the key's row and the work's own rows
 * are one transaction, so a repeat waits for the first and then gets its answer.
 */
export async function answerOnce(
	{ personId, key, request }: Asked,
	work: () => Promise<StoredAnswer>
): Promise<StoredAnswer> {
	requireKey(key);
	const requestHash = sha256(request);
	try {
		return await inTransaction(async (transaction) => {
			await connection().query(
				`INSERT INTO idempotency_keys (person_id, idempotency_key, request_sha256, created_at)
				 VALUES (:personId, :key, :requestHash, UTC_TIMESTAMP(3))`,
				{ replacements: { personId, key, requestHash }, transaction }
			);
			const answer = await work();
			await connection().query(
				`UPDATE idempotency_keys SET status = :status, response = :body
				 WHERE person_id = :personId AND idempotency_key = :key`,
				{ replacements: { personId, key, ...answer }, transaction }
			);
			return answer;
		});
	} catch (error) {
		if (databaseErrorNumber(error) !== DUPLICATE_ENTRY) throw error;
		const stored = await findAnswer({ personId, key, request });
		if (!stored) throw error;
		return stored;
	}
}

/**
 * Asks whether this was done before, then prepares, then keeps it once for its key: what takes seconds is prepared in no
 * transaction, so that nobody waits for it.
 */
export async function keepOnce<Prepared>(
	asked: { personId: number; key: string | null; request: string },
	prepare: () => Promise<Prepared>,
	keep: (prepared: Prepared) => Promise<StoredAnswer>
): Promise<StoredAnswer> {
	const { personId, key, request } = asked;
	if (key === null) return keep(await prepare());
	const done = await findAnswer({ personId, key, request });
	if (done) return done;
	const prepared = await prepare();
	return answerOnce({ personId, key, request }, () => keep(prepared));
}
