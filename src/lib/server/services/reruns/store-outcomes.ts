import { Op, QueryTypes, type Transaction } from 'sequelize';
import { connection } from '../../db/connection';
import { Assessment, Job, Mount, Rerun, RerunItem } from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { recordAll, type AuditRecord } from '../audit';
import { refreshOutcomes } from '../job-outcome';
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
	mounts: Map<number, Mount>;
	/** The newest assessment of each mount. */
	newest: Map<number, Assessment>;
}

const byId = <Row extends { id: number }>(rows: readonly Row[]): Map<number, Row> =>
	new Map(rows.map((row) => [row.id, row]));

async function newestIds(mountIds: number[], transaction: Transaction): Promise<Map<number, number>> {
	const rows = await connection().query<{ id: number; mountId: number }>(
		'SELECT MAX(id) AS id, mount_id AS mountId FROM assessments WHERE mount_id IN (:mountIds) GROUP BY mount_id',
		{ replacements: { mountIds }, transaction, type: QueryTypes.SELECT }
	);
	return new Map(rows.map(({ id, mountId }) => [mountId, id]));
}

async function readStanding(rerun: Rerun, items: RerunItem[], transaction: Transaction): Promise<Standing> {
	const lock = transaction.LOCK.UPDATE;
	const mountIds = items.map(({ mountId }) => mountId);
	// Held, so that nobody assesses on the same job meanwhile.
	await Job.findAll({
		where: { id: items.map(({ jobId }) => jobId) },
		attributes: ['id'],
		order: [['id', 'ASC']],
		...{ transaction, lock }
	});
	const mounts = await Mount.findAll({ where: { id: mountIds }, transaction });
	const newest = await newestIds(mountIds, transaction);
	const assessments = await Assessment.findAll({
		where: { id: [...newest.values()] },
		attributes: ['id', 'mountId', 'verdict', 'inputsSha256'],
		transaction
	});
	return {
		rerun,
		mounts: byId(mounts),
		newest: new Map(assessments.map((each) => [each.mountId, each]))
	};
}

interface Kept {
	item: RerunItem;
	before: Assessment;
	bookId: number;
	outcome: RerunOutcome;
}

type Settled = { kept: Kept } | { left: Pick<RerunItem, 'state' | 'reason'> } | null;

/** What becomes of an item; null where what it was made from has changed since it was read: it waits, and is read again. */
function settle(item: RerunItem, { fromSha256, bookId, answer }: Ran, { mounts, newest }: Standing): Settled {
	const before = newest.get(item.mountId);
	if (mounts.get(item.mountId)?.removedAt !== null)
		return { left: { state: 'passed-over', reason: REMOVED } };
	if (before?.id !== item.assessmentId) return { left: { state: 'passed-over', reason: SUPERSEDED } };
	if (before.inputsSha256 !== fromSha256) return null;
	if ('reason' in answer) {
		return { left: { state: 'failed', reason: answer.reason.slice(0, LONGEST_REASON) } };
	}
	return { kept: { item, before, bookId, outcome: answer.outcome } };
}

function rowOf({ item, bookId, outcome }: Kept, { begunBy: createdBy }: Rerun) {
	const { workshopId, jobId, mountId } = item;
	const { inputs, inputsSha256, result } = outcome;
	return {
		...{ workshopId, jobId, mountId, bookId, inputs, inputsSha256, result, createdBy },
		...columnsOf(result),
		chemistry: inputs.battery.chemistry
	};
}

function entryOf({ item, outcome }: Kept, subjectId: number, { id: rerunId, begunBy }: Rerun): AuditRecord {
	const { workshopId, jobId, mountId } = item;
	const { inputsSha256, result } = outcome;
	const { verdict, headroomK } = result;
	return {
		...{
			workshopId,
			personId: begunBy,
			action: 'assessment.made-again',
			subjectType: 'assessment',
			subjectId
		},
		detail: { jobId, mountId, verdict, headroomK, inputsSha256, rerunId }
	};
}

/** Keeps new assessments, all at once, and lets items, jobs and the trail tell of them. */
async function keepAll(kept: readonly Kept[], { rerun }: Standing, transaction: Transaction): Promise<void> {
	if (kept.length === 0) return;
	await Assessment.bulkCreate(
		kept.map((each) => rowOf(each, rerun)),
		{ transaction }
	);
	const idOf = await newestIds(
		kept.map(({ item }) => item.mountId),
		transaction
	);
	for (const { item, before, outcome } of kept) {
		const { result, cutOutShare } = outcome;
		const verdictChanged = before.verdict !== result.verdict;
		item.set({ state: 'done', newAssessmentId: idOf.get(item.mountId)!, cutOutShare, verdictChanged });
	}
	await refreshOutcomes([...new Set(kept.map(({ item }) => item.jobId))], transaction);
	await recordAll(
		kept.map((each) => entryOf(each, idOf.get(each.item.mountId)!, rerun)),
		transaction
	);
}

/** Columns of an item that its end changes. */
const ENDED: (keyof RerunItem['_attributes'])[] = [
	...(['state', 'reason', 'newAssessmentId', 'cutOutShare', 'verdictChanged'] as const)
];

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
		const kept: Kept[] = [];
		for (const item of items) {
			const settled = settle(
				item,
				ran.find(({ itemId }) => itemId === item.id)!,
				standing
			);
			if (settled === null) continue;
			if ('kept' in settled) kept.push(settled.kept);
			else item.set(settled.left);
		}
		await keepAll(kept, standing, transaction);
		const ended = items.filter(({ state }) => state !== 'waiting').map((item) => item.get());
		await RerunItem.bulkCreate(ended, { updateOnDuplicate: ENDED, transaction });
	});
}
