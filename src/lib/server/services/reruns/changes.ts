import { Op, type Transaction } from 'sequelize';
import { formatVehicle } from '$lib/format/vehicles';
import type { SignedInPerson } from '$lib/schemas/people';
import type { RerunChange, RerunLeft, Tell } from '$lib/schemas/reruns';
import {
	Assessment,
	Installation,
	Job,
	Mount,
	Person,
	RerunItem,
	Sheet,
	Workshop,
	type Customer
} from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { AppError, notFound } from '../../errors';
import { postLetter } from '../../mail/outbox';
import { draftVerdictLetter, writeVerdictLetter } from '../../mail/verdict-letter';
import { allow } from '../../policies';
import { recordBy } from '../audit';
import { WITHOUT_TEXTS } from '../job-outcome';
import { findRerun } from './reruns';

const PAGE_ROWS = 25;

/** Everything that some items' rows are told with, each table read once. */
async function readAround(items: RerunItem[], person: SignedInPerson) {
	const jobIds = items.map(({ jobId }) => jobId);
	const assessmentIds = items.flatMap(({ assessmentId, newAssessmentId }) => [
		assessmentId,
		...(newAssessmentId ? [newAssessmentId] : [])
	]);
	const [jobs, mounts, assessments, installations, sheets, workshop] = await Promise.all([
		Job.findAll({ where: { id: jobIds }, include: ['customer', 'vehicle'] }),
		Mount.findAll({ where: { id: items.map(({ mountId }) => mountId) } }),
		Assessment.findAll({ where: { id: assessmentIds }, attributes: WITHOUT_TEXTS }),
		Installation.findAll({ where: { mountId: items.map(({ mountId }) => mountId) } }),
		Sheet.findAll({ where: { jobId: jobIds, withdrawnAt: null }, attributes: ['id', 'jobId', 'sentTo'] }),
		Workshop.findByPk(person.workshopId)
	]);
	const hands = [...assessments.map(({ createdBy }) => createdBy), ...items.map(({ toldBy }) => toldBy ?? 0)];
	const people = await Person.findAll({ where: { id: hands }, attributes: ['id', 'name'] });
	return { jobs, mounts, assessments, installations, sheets, workshop: workshop!, people };
}
type Around = Awaited<ReturnType<typeof readAround>>;

/** To the address that the page went to, or the one that the shop knows. */
const addressOf = (sheet: Sheet | undefined, { email }: Customer): string => sheet?.sentTo || email;

const outcomeOf = ({ id: assessmentId, verdict, headroomK, peakCellsC }: Assessment) => ({
	...{ assessmentId, verdict, headroomK, peakCellsC }
});

function presentChange(item: RerunItem, around: Around, person: SignedInPerson): RerunChange {
	const job = around.jobs.find(({ id }) => id === item.jobId)!;
	const mount = around.mounts.find(({ id }) => id === item.mountId)!;
	const before = around.assessments.find(({ id }) => id === item.assessmentId)!;
	const after = around.assessments.find(({ id }) => id === item.newAssessmentId)!;
	const sheet = around.sheets.find(({ jobId }) => jobId === job.id);
	const customer = job.customer!;
	const isFitted = around.installations.some(({ mountId }) => mountId === mount.id);
	const nameOf = (id: number | null | undefined) => around.people.find((each) => each.id === id)?.name ?? '';
	const { name, phone, email } = around.workshop;
	const draft = draftVerdictLetter({
		...{ customerName: customer.name, vehicle: formatVehicle(job.vehicle!), mountName: mount.name },
		...{ chemistry: after.chemistry, before: before.verdict, after: after.verdict, isFitted },
		...{ workshop: { name, phone, email }, by: person.name }
	});
	return {
		...{ id: item.id, jobId: job.id, jobNumber: job.number, customerName: customer.name },
		...{ mountLetter: mount.letter, mountName: mount.name, chemistry: after.chemistry },
		...{ before: outcomeOf(before), after: outcomeOf(after), cutOutShare: item.cutOutShare ?? null },
		...{ isFitted, wasSent: sheet !== undefined, assessedBy: nameOf(before.createdBy) },
		...{ recipient: addressOf(sheet, customer), draft },
		toldAt: item.toldAt?.toISOString() ?? null,
		toldBy: nameOf(item.toldBy),
		toldHow: item.toldHow ?? null
	};
}

/** Verdicts that changed, a page at a time. */
export async function listChanges(
	person: SignedInPerson,
	rerunId: number,
	page: number
): Promise<{ rows: RerunChange[]; hasMore: boolean }> {
	allow(person, 'reruns.read');
	await findRerun(person, rerunId);
	const items = await RerunItem.findAll({
		where: { rerunId, verdictChanged: true },
		order: [['id', 'ASC']],
		offset: (page - 1) * PAGE_ROWS,
		limit: PAGE_ROWS + 1
	});
	const shown = items.slice(0, PAGE_ROWS);
	if (shown.length === 0) return { rows: [], hasMore: false };
	const around = await readAround(shown, person);
	return {
		rows: shown.map((item) => presentChange(item, around, person)),
		hasMore: items.length > PAGE_ROWS
	};
}

/** One verdict that changed. */
export async function getChange(
	person: SignedInPerson,
	{ rerunId, itemId }: { rerunId: number; itemId: number }
): Promise<RerunChange> {
	allow(person, 'reruns.read');
	await findRerun(person, rerunId);
	const item = await RerunItem.findOne({ where: { id: itemId, rerunId, verdictChanged: true } });
	if (!item) throw notFound('changed verdict');
	return presentChange(item, await readAround([item], person), person);
}

/** What was not assessed again, with the reason. */
export async function listLeft(person: SignedInPerson, rerunId: number): Promise<RerunLeft[]> {
	allow(person, 'reruns.read');
	await findRerun(person, rerunId);
	const items = await RerunItem.findAll({
		where: { rerunId, state: { [Op.in]: ['passed-over', 'failed'] } },
		order: [['id', 'ASC']],
		limit: 200
	});
	if (items.length === 0) return [];
	const { jobs, mounts } = await readAround(items, person);
	return items.map(({ id, jobId, mountId, state, reason }) => ({
		...{ id, jobId, state, reason },
		jobNumber: jobs.find((job) => job.id === jobId)!.number,
		mountLetter: mounts.find((mount) => mount.id === mountId)!.letter
	}));
}

async function sendTo(
	change: RerunChange,
	letter: { subject: string; body: string },
	person: SignedInPerson,
	transaction: Transaction
): Promise<void> {
	const { recipient, jobId } = change;
	if (recipient === '') {
		const message = 'The shop knows no e-mail of this customer: tell them in another way, and note that.';
		throw new AppError('conflict', message, [{ path: 'body', message }]);
	}
	const { workshopId, workshopName } = person;
	const laidOut = writeVerdictLetter(workshopName, letter);
	const workshop = await Workshop.findByPk(workshopId, { transaction });
	const about = { kind: 'verdict-changed', workshopId, jobId, recipient } as const;
	await postLetter({ ...laidOut, ...about, replyTo: workshop?.email ?? '' }, transaction);
}

/** A letter tells of what holds now: not of a mount that is gone, nor of a verdict that another assessment has overtaken. */
async function requireNewest(
	{ mountId, newAssessmentId }: RerunItem,
	transaction: Transaction
): Promise<void> {
	const mount = await Mount.findByPk(mountId, { transaction });
	const newest = await Assessment.max<number, Assessment>('id', { where: { mountId }, transaction });
	if (mount && (mount.removedAt ?? null) === null && newest === newAssessmentId) return;
	const message =
		'This verdict does not hold any more: the mount was assessed again since, or taken away. Look at the job before you tell anybody.';
	throw new AppError('conflict', message);
}

/** Tells a customer of a changed verdict by letter, or notes that they were told otherwise; once. */
export async function tellOfChange(
	person: SignedInPerson,
	{ rerunId, itemId }: { rerunId: number; itemId: number },
	tell: Tell
): Promise<RerunChange> {
	allow(person, 'reruns.write');
	return inTransaction(async (transaction) => {
		await findRerun(person, rerunId);
		const where = { id: itemId, rerunId, verdictChanged: true };
		const item = await RerunItem.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
		if (!item) throw notFound('changed verdict');
		if (item.toldAt) throw new AppError('conflict', 'Somebody has told them already.');
		const present = async () => presentChange(item, await readAround([item], person), person);
		if (tell.how === 'letter') {
			await requireNewest(item, transaction);
			await sendTo(await present(), tell, person, transaction);
		}
		await item.update({ toldAt: new Date(), toldBy: person.id, toldHow: tell.how }, { transaction });
		const detail = { rerunId, mountId: item.mountId, how: tell.how };
		await recordBy(person, 'rerun.told', { type: 'job', id: item.jobId }, transaction, detail);
		return present();
	});
}
