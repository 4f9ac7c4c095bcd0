import { Op } from 'sequelize';
import { StoredFile, Trace } from '../db/models';
import { clearIncoming, storage } from '../storage';
import { removeContents } from './files';
import { removeTraceContents } from './trace-bins';

const HOUR_MS = 60 * 60_000;
/** For so long a removed file can be put back. */
export const KEEP_REMOVED_DAYS = 30;
const BATCH = 200;

/** Removes for good what was taken away long ago: the row first, for no row may be without its content. */
async function clearRemoved(now: Date): Promise<number> {
	const before = new Date(now.getTime() - KEEP_REMOVED_DAYS * 24 * HOUR_MS);
	const files = await StoredFile.findAll({ where: { removedAt: { [Op.lt]: before } }, limit: BATCH });
	for (const file of files) {
		const where = { id: file.id, removedAt: { [Op.lt]: before } };
		if ((await StoredFile.destroy({ where })) === 1) await removeContents(file.contentId);
	}
	return files.length;
}

/** Of a file whose columns nobody confirmed. */
const KEEP_UNREAD_DAYS = 7;
const UNREAD = ['described', 'failed'];

/** Traces that were taken away long ago, and files that nobody had read: the row first here, too. */
async function clearTraces(now: Date): Promise<number> {
	const daysAgo = (days: number): Date => new Date(now.getTime() - days * 24 * HOUR_MS);
	const old = {
		[Op.or]: [
			{ removedAt: { [Op.lt]: daysAgo(KEEP_REMOVED_DAYS) } },
			{ state: UNREAD, updatedAt: { [Op.lt]: daysAgo(KEEP_UNREAD_DAYS) } }
		]
	};
	const traces = await Trace.findAll({ where: old, limit: BATCH, attributes: ['id', 'contentId'] });
	for (const { id, contentId } of traces) {
		if ((await Trace.destroy({ where: { id, ...old } })) === 1) await removeTraceContents(contentId);
	}
	return traces.length;
}

async function clearUnowned(keys: readonly string[]): Promise<number> {
	const idOf = (key: string): string => key.split('.')[0]!;
	const ids = [...new Set(keys.map(idOf))];
	const of = { where: { contentId: ids }, attributes: ['contentId'] };
	const owned = [...(await StoredFile.findAll(of)), ...(await Trace.findAll(of))];
	const known = new Set(owned.map(({ contentId }) => contentId));
	const unowned = keys.filter((key) => !known.has(idOf(key)));
	for (const key of unowned) await storage().remove(key);
	return unowned.length;
}

/** Contents whose row never came to be; younger ones may be waiting for theirs. */
async function clearOrphans(before: Date): Promise<number> {
	let cleared = 0;
	let batch: string[] = [];
	for await (const { key, putAt } of storage().list()) {
		if (putAt < before) batch.push(key);
		if (batch.length < BATCH) continue;
		cleared += await clearUnowned(batch);
		batch = [];
	}
	return cleared + (batch.length > 0 ? await clearUnowned(batch) : 0);
}

/** Clears away files that are nobody's any more, and says how many. */
export async function clearFiles(now = new Date()): Promise<number> {
	const anHourAgo = new Date(now.getTime() - HOUR_MS);
	const removed = (await clearRemoved(now)) + (await clearTraces(now));
	return removed + (await clearOrphans(anHourAgo)) + (await clearIncoming(anHourAgo));
}
