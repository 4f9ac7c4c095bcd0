import { QueryTypes } from 'sequelize';
import { connection } from '../db/connection';
import { logger } from '../logger';
import { clearFiles } from './clear-files';
import { clearErasedLetters } from './erasing/erased-letters';
import { askForAged } from './retention';

const EVERY_MS = 60 * 60_000;

/** What is worth nothing after its time, and how long that is. */
const EXPIRED: readonly { table: string; past: string }[] = [
	{ table: 'idempotency_keys', past: 'created_at < UTC_TIMESTAMP(3) - INTERVAL 1 DAY' },
	{ table: 'sign_in_links', past: 'expires_at < UTC_TIMESTAMP(3)' },
	{ table: 'sign_in_steps', past: 'expires_at < UTC_TIMESTAMP(3)' },
	{ table: 'rate_limits', past: 'window_ends_at < UTC_TIMESTAMP(3)' },
	// A session is over after eight hours; for a month it can still be seen who was in.
	{ table: 'sessions', past: 'created_at < UTC_TIMESTAMP(3) - INTERVAL 30 DAY' }
];

/** Deletes what is past its time, rows and files, puts aged customers before their manager, and says how many that were. */
export async function clearExpired(): Promise<number> {
	let cleared = 0;
	for (const { table, past } of EXPIRED) {
		cleared += await connection().query(`DELETE FROM ${table} WHERE ${past}`, {
			type: QueryTypes.BULKDELETE
		});
	}
	return cleared + (await clearFiles()) + (await clearErasedLetters()) + (await askForAged());
}

let timer: NodeJS.Timeout | undefined;

export function startClearing(): void {
	timer ??= setInterval(() => {
		clearExpired().catch((error: unknown) => logger.error({ err: error }, 'clearing failed'));
	}, EVERY_MS);
}

export function stopClearing(): void {
	clearInterval(timer);
	timer = undefined;
}
