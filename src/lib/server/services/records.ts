import { OptimisticLockError, UniqueConstraintError, type Model, type Transaction } from 'sequelize';
import { AppError, changedMeanwhile } from '../errors';

/** Saves changes only when the person saw the newest version; otherwise says so and stores nothing. */
export async function saveVersioned<M extends Model & { version: number }>(
	record: M,
	what: string,
	seenVersion: number,
	changes: Parameters<M['update']>[0],
	transaction: Transaction
): Promise<void> {
	if (record.version !== seenVersion) throw changedMeanwhile(what);
	try {
		await record.update(changes, { transaction });
	} catch (error) {
		if (error instanceof OptimisticLockError) throw changedMeanwhile(what);
		throw error;
	}
}

/** A name that is taken is the person's matter, not a fault: says which field. */
export async function orNameTaken<T>(what: string, field: string, work: () => Promise<T>): Promise<T> {
	try {
		return await work();
	} catch (error) {
		if (!(error instanceof UniqueConstraintError)) throw error;
		const message = `There is a ${what} of this name already: choose another, or change that one.`;
		throw new AppError('conflict', message, [{ path: field, message }]);
	}
}

/** A record that was chosen in a form or a body and is not in this workshop: says at which field. */
export function notThere(what: string, field: string): AppError {
	const message = `There is no such ${what} here: choose one of the list.`;
	return new AppError('invalid_input', message, [{ path: field, message }]);
}
