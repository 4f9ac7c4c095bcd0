import { Op, QueryTypes, type Transaction } from 'sequelize';
import { connection } from '../../db/connection';
import { Assessment, Job, Mount, Rerun, RerunItem } from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { record } from '../audit';
import { updateJobOutcome, WITHOUT_TEXTS } from '../job-outcome';
import { columnsOf } from '../run-inputs';
import type { RerunAnswer, RerunOutcome } from './rerun-inputs';

/** What a thread made of an item, with which book, and what it was made from. */
export interface Ran {
	itemId: number;
	/** Of the inputs that were sent to the thread: a customer may have been forgotten meanwhile. */
	fromSha256: string;
	bookId: number;
	answer: RerunAnswer;
}

const LONGEST_REASON = 500;
const SUPERSEDED = 'It was assessed anew meanwhile.';
const REMOVED = 'Its mount was removed meanwhile.';

/** What the rows are now, read under locks. */
interface Standing {
	rerun: Rerun;
	jobs: Map<number, Job>;
	mounts: Map<number, Mount>;
	/** The newest assessment of each mount. */
	newest: Map<number, Assessment>;
}

const byId = <Row extends { id: number }>(rows: readonly Row[]): Map<number, Row> =>
	new Map(rows.map((row) => [row.id, row]));

async function readStanding(rerun: Rerun, items: RerunItem[], transaction: Transaction): Promise<Standing> {
	const lock = transaction.LOCK.UPDATE;
	const mountIds = items.map(({ mountId }) => mountId);
	const jobs = await Job.findAll({
		where: { id: items.map(({ jobId }) => jobId) },
		order: [['id', 'ASC']],
		...{ transaction, lock }
	});
	const mounts = await Mount.findAll({ where: { id: mountIds }, transaction });
	const newest = await connection().query<{ id: number }>(
		'SELECT MAX(id) AS id FROM assessments WHERE mount_id IN (:mountIds) GROUP BY mount_id',
		{ replacements: { mountIds }, transaction, type: QueryTypes.SELECT }
	);
	const assessments = await Assessment.findAll({
		where: { id: newest.map(({ id }) => id) },
		attributes: WITHOUT_TEXTS,
		transaction
	});
	return {
		rerun,
		jobs: byId(jobs),
		mounts: byId(mounts),
		newest: new Map(assessments.map((each) => [each.mountId, each]))
	};
}

async function keep(
	item: RerunItem,
	before: Assessment,
	{ bookId, outcome }: { bookId: number; outcome: RerunOutcome },
	{ rerun, jobs }: Standing,
	transaction: Transaction
): Promise<void> {
	const { inputs, inputsSha256, result, cutOutShare } = outcome;
	const { workshopId, jobId, mountId } = item;
	const { begunBy: createdBy } = rerun;
	const made = await Assessment.create(
		{
			...{ workshopId, jobId, mountId, bookId, inputs, inputsSha256, result, createdBy },
			...columnsOf(result),
			chemistry: inputs.battery.chemistry
		},
		{ transaction }
	);
	await updateJobOutcome(jobs.get(jobId)!, transaction);
	const verdictChanged = before.verdict !== result.verdict;
	const done = { state: 'done', newAssessmentId: made.id, cutOutShare, verdictChanged } as const;
	await item.update(done, { transaction });
	const { verdict, headroomK } = result;
	const detail = { jobId, mountId, verdict, headroomK, inputsSha256, rerunId: rerun.id };
	const subject = { subjectType: 'assessment', subjectId: made.id, detail };
	await record({ workshopId, personId: createdBy, action: 'assessment.made-again', ...subject }, transaction);
}

async function settle(
	item: RerunItem,
	{ fromSha256, bookId, answer }: Ran,
	standing: Standing,
	transaction: Transaction
): Promise<void> {
	const leave = (state: 'passed-over' | 'failed', reason: string) =>
		item.update({ state, reason: reason.slice(0, LONGEST_REASON) }, { transaction });
	const before = standing.newest.get(item.mountId);
	if (standing.mounts.get(item.mountId)?.removedAt !== null)
		return void (await leave('passed-over', REMOVED));
	if (before?.id !== item.assessmentId) return void (await leave('passed-over', SUPERSEDED));
	// Changed since it was read: it waits, and is read again.
	if (before.inputsSha256 !== fromSha256) return;
	if ('reason' in answer) return void (await leave('failed', answer.reason));
	await keep(item, before, { bookId, outcome: answer.outcome }, standing, transaction);
}

/**
 * Keeps what the threads made, all of it or nothing. An item that is not waiting any more, or whose re-run was cancelled,
 * is left as it is: so each is done once, whoever else is at work.
 */
export async function storeOutcomes(rerunId: number, ran: readonly Ran[]): Promise<void> {
	await inTransaction(async (transaction) => {
		const lock = transaction.LOCK.UPDATE;
		const rerun = await Rerun.findByPk(rerunId, { transaction, lock });
		if (rerun?.state !== 'running') return;
		const ids = ran.map(({ itemId }) => itemId);
		const where = { rerunId, id: { [Op.in]: ids }, state: 'waiting' };
		const items = await RerunItem.findAll({ where, order: [['id', 'ASC']], transaction, lock });
		if (items.length === 0) return;
		const standing = await readStanding(rerun, items, transaction);
		for (const item of items) {
			await settle(
				item,
				ran.find(({ itemId }) => itemId === item.id)!,
				standing,
				transaction
			);
		}
	});
}
