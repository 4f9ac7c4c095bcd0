import { QueryTypes, type Transaction } from 'sequelize';
import { connection } from '../../db/connection';
import { outsideTransaction } from '../../db/transaction';
import { UNHELD_TRACES } from './check-scope';
import { continueHolding } from './hold-waiting';

/** The traces that are asked for: what they have in common with the subject of that number. */
const SCOPES = {
	all: 'TRUE',
	mount: 't.mount_id = :id',
	/** A file everywhere it was sent in, for which of its traces counts depends on the others. */
	file: `(t.workshop_id, t.sha256) IN (SELECT s.workshop_id, s.sha256 FROM traces s WHERE s.id = :id)`,
	/** Every file of a mount, wherever else it was sent in. */
	'files-of-mount': `(t.workshop_id, t.sha256) IN (SELECT s.workshop_id, s.sha256 FROM traces s WHERE s.mount_id = :id)`
} as const;

/**
 * Asks for traces that nothing is held against to be held against what had been predicted of their days. That is done once
 * this transaction is kept, outside of it and of the request; what is asked for outlasts the process.
 */
export async function askToHold(
	scope: keyof typeof SCOPES,
	id: number,
	transaction: Transaction
): Promise<void> {
	const unheld = await connection().query<{ id: number }>(
		`SELECT t.id FROM ${UNHELD_TRACES} AND ${SCOPES[scope]} ORDER BY t.id`,
		{ replacements: { id }, type: QueryTypes.SELECT, transaction }
	);
	if (unheld.length === 0) return;
	await connection().query('INSERT INTO traces_to_hold (trace_id) VALUES :rows', {
		replacements: { rows: unheld.map((trace) => [trace.id]) },
		transaction
	});
	transaction.afterCommit(() => outsideTransaction(continueHolding));
}

/** Forgets what was held against the traces of these files. */
const FORGET = `
	DELETE c FROM prediction_checks c
		JOIN traces t ON t.id = c.trace_id
		JOIN traces s ON s.sha256 = t.sha256 AND s.workshop_id = t.workshop_id
`;

async function forget(where: string, id: number, transaction: Transaction): Promise<void> {
	const options = { replacements: { id }, type: QueryTypes.DELETE, transaction };
	await connection().query(`${FORGET} WHERE ${where}`, options);
}

/** Has a file held anew, inside the transaction that changed a trace of it. */
export async function holdFileAnew(traceId: number, transaction: Transaction): Promise<void> {
	await forget('s.id = :id', traceId, transaction);
	await askToHold('file', traceId, transaction);
}

/** The same of every file of a mount that goes or comes back. */
export async function holdMountAnew(mountId: number, transaction: Transaction): Promise<void> {
	await forget('s.mount_id = :id', mountId, transaction);
	await askToHold('files-of-mount', mountId, transaction);
}
