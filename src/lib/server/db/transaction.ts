import { AsyncLocalStorage } from 'node:async_hooks';
import { QueryTypes, Sequelize, type Transaction } from 'sequelize';
import { connection } from './connection';

/** Errors after which the same transaction may simply be tried again: changed since read, lock wait, deadlock. */
const RETRYABLE = new Set([1020, 1205, 1213]);
const ATTEMPTS = 5;

type Context = Map<string, unknown>;
const contexts = new AsyncLocalStorage<Context>();

/** What Sequelize asks of a place to keep the current transaction, so that every query inside one joins it by itself. */
const currentContext = {
	run: (work: (context: Context) => unknown): unknown => {
		const context: Context = new Map(contexts.getStore());
		return contexts.run(context, () => work(context));
	},
	bind: <T>(work: T): T => work,
	get: (key: string): unknown => contexts.getStore()?.get(key),
	set: (key: string, value: unknown): void => {
		contexts.getStore()?.set(key, value);
	}
};
Sequelize.useCLS(currentContext);

export function databaseErrorNumber(error: unknown): number | undefined {
	const original = (error as { original?: { errno?: number } } | null)?.original;
	return original?.errno;
}

function pause(ms: number): Promise<void> {
	return new Promise((resolve) => setTimeout(resolve, ms));
}

/**
 * Holds what all changes meet over, the heads of the audit trail, before anything is read. Otherwise a slow change would
 * lose against quick ones again and again, for what it has read is old by the time that it writes.
 */
async function goFirst(transaction: Transaction): Promise<void> {
	await connection().query('SELECT sequence FROM audit_heads FOR UPDATE', {
		transaction,
		type: QueryTypes.SELECT
	});
}

/**
 * Runs the work in one transaction; after a lost race it is done again from the start, after a growing random pause and
 * with the others waiting.
 * Work that is already inside one joins it: all of it is kept, or none.
 */
export async function inTransaction<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
	const outer = currentContext.get('transaction') as Transaction | null | undefined;
	if (outer) return work(outer);
	for (let attempt = 1; ; attempt++) {
		try {
			return await connection().transaction(async (transaction) => {
				if (attempt > 1) await goFirst(transaction);
				return work(transaction);
			});
		} catch (error) {
			const again = RETRYABLE.has(databaseErrorNumber(error) ?? 0) && attempt < ATTEMPTS;
			if (!again) throw error;
			await pause(Math.random() * 20 * 2 ** attempt);
		}
	}
}

/** Starts work that belongs to no transaction, wherever it is called from. */
export function outsideTransaction<T>(work: () => T): T {
	return contexts.exit(work);
}
