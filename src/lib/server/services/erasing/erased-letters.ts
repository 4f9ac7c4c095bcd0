import { ERASED } from '$lib/schemas/erasures';
import { Erasure, Job, OutgoingMail } from '../../db/models';
import { env } from '../../env';
import { logger } from '../../logger';
import { listKeptLetters, removeKeptLetter } from '../../mail/mailbox-folder';

const BATCH = 200;

async function findErasedJobs(jobIds: readonly number[]): Promise<Set<number>> {
	const jobs = await Job.findAll({ where: { id: [...jobIds] }, attributes: ['id', 'customerId'] });
	const customerId = jobs.map((job) => job.customerId);
	const granted = await Erasure.findAll({
		where: { state: 'granted', customerId },
		attributes: ['customerId']
	});
	const gone = new Set(granted.map((erasure) => erasure.customerId));
	return new Set(jobs.filter((job) => gone.has(job.customerId)).map(({ id }) => id));
}

/** Of whom nothing is held any more nothing is shown nor kept, even where a letter comes late. */
export async function withoutErased(letters: readonly OutgoingMail[]): Promise<OutgoingMail[]> {
	const erasedJobs = await findErasedJobs(letters.flatMap(({ jobId }) => jobId ?? []));
	return letters.filter(
		({ jobId, kind, recipient }) =>
			!(jobId !== null && erasedJobs.has(jobId)) && !(recipient === ERASED && kind !== 'erasure-granted')
	);
}

/**
 * Takes the letters of erased people out of the folder for good, each as often as it lies there, and says how many
 * went. One that cannot be removed is told to the log and is tried again with the next clearing.
 */
export async function clearErasedLetters(): Promise<number> {
	const { MAILBOX_DIR } = env();
	if (!MAILBOX_DIR) return 0;
	const kept = await listKeptLetters(MAILBOX_DIR, Infinity);
	let cleared = 0;
	for (let from = 0; from < kept.length; from += BATCH) {
		const batch = kept.slice(from, from + BATCH);
		const rows = await OutgoingMail.findAll({ where: { messageId: batch.map((each) => each.messageId) } });
		const standing = new Set((await withoutErased(rows)).map(({ messageId }) => messageId));
		const erased = new Set(rows.map(({ messageId }) => messageId).filter((id) => !standing.has(id)));
		for (const { file, messageId } of batch) {
			if (!erased.has(messageId)) continue;
			try {
				await removeKeptLetter(file);
				cleared++;
			} catch (error) {
				logger.error({ err: error }, 'a letter of an erased person stays in the mailbox for now');
			}
		}
	}
	return cleared;
}
