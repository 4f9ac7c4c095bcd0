import type { Transaction } from 'sequelize';
import { connection } from './connection';

/** Errors after which the same transaction may simply be tried again: changed since read, lock wait, deadlock. */
const RETRYABLE = new Set([1020, 1205, 1213]);
const ATTEMPTS = 5;

function databaseErrorNumber(error: unknown): number | undefined {
	const original = (error as { original?: { errno?: number } } | null)?.original;
	return original?.errno;
}

function pause(ms: number): Promise<void> {
	return new Promise((resolve) => setTimeout(resolve, ms));
}

/** Runs the work in one transaction; after a lost race it is done again from the start, with a growing random pause. */
export async function inTransaction<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
	for (let attempt = 1; ; attempt++) {
		try {
			return await connection().transaction(work);
		} catch (error) {
			const again = RETRYABLE.has(databaseErrorNumber(error) ?? 0) && attempt < ATTEMPTS;
			if (!again) throw error;
			await pause(Math.random() * 20 * 2 ** attempt);
		}
	}
}
