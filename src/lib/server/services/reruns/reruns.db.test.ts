import { spawn } from 'node:child_process';
import { describe, expect, it, vi } from 'vitest';
import {
	addSurveyedMount,
	COOL_CABIN,
	HOT_CORNER,
	makeAssessableJob
} from '../../../../../tests/support/assessable-job';
import { makeCrew, useTestDatabase, type Crew } from '../../../../../tests/support/services';
import {
	Assessment,
	AuditEntry,
	CoefficientBook,
	Customer,
	Job,
	OutgoingMail,
	Rerun,
	RerunItem
} from '../../db/models';
import { logger } from '../../logger';
import { assessJob, assessMount, reproduceAssessment } from '../assessments';
import { checkTrails } from '../audit-check';
import { changeCoefficient, draftBook, moveBook } from '../book-changes';
import { bookInForce } from '../books';
import { removeMount } from '../mounts';
import { listChanges, listLeft, tellOfChange } from './changes';
import { getRerun, listReruns, moveRerun } from './reruns';
import { finishReruns, stopReruns } from './run-reruns';

useTestDatabase();

const UNDER_BONNET = { engineLayout: 'inline', positionKind: 'under-bonnet' } as const;

/** A job whose mounts by the exhaust and in the cabin are assessed. */
async function makeAssessed(crew: Crew, more = 0) {
	const { jobId, hot, cool } = await makeAssessableJob(crew.installer);
	for (let at = 0; at < more; at++) {
		await addSurveyedMount(
			jobId,
			crew.workshopId,
			String.fromCharCode('C'.charCodeAt(0) + at),
			at % 2 ? HOT_CORNER : COOL_CABIN
		);
	}
	await assessJob(crew.installer, jobId);
	return { jobId, hot, cool };
}

/** Puts a book in force in which the bay keeps another share of the engine’s heat, or some other value is another. */
async function putInForce(crew: Crew, value: number, scope = {}, at = { group: 'bay', key: 'share' }) {
	const from = await bookInForce(crew.installer, UNDER_BONNET);
	const draft = await draftBook(crew.engineer, {
		fromBookId: from.id,
		name: `Share ${value}`,
		note: '',
		...scope
	});
	const { version } = await changeCoefficient(crew.engineer, draft.id, at, {
		value,
		origin: 'judgement',
		source: 'Made up for this test.',
		version: draft.version
	});
	const trial = await moveBook(crew.engineer, draft.id, { to: 'on-trial', version });
	return moveBook(crew.manager, draft.id, { to: 'in-force', version: trial.version });
}

/** The number of new assessments of each mount of a workshop, and of entries in its trail that tell of them. */
async function countMade({ workshopId }: Crew) {
	const items = await RerunItem.findAll({ where: { workshopId } });
	const made = await Assessment.findAll({ where: { workshopId }, attributes: ['id', 'mountId'] });
	const told = await AuditEntry.count({ where: { workshopId, action: 'assessment.made-again' } });
	const perMount = items.map(({ mountId }) => made.filter((each) => each.mountId === mountId).length - 1);
	return { items: items.length, perMount: [...new Set(perMount)], told };
}

describe('a book that comes into force', () => {
	it('lets what it concerns be assessed again, from what it was assessed with, and keeps what was', async () => {
		const crew = await makeCrew();
		const { jobId, hot } = await makeAssessed(crew);
		// Changed after the assessment: the re-run changes the book alone.
		await Job.update({ hotDayMaxC: 30 }, { where: { id: jobId } });
		const book = await putInForce(crew, 0.15);
		await finishReruns();
		const [rerun] = await listReruns(crew.engineer);
		expect(rerun).toMatchObject({
			...{ bookId: book.id, occasion: 'in-force', begunBy: crew.manager.name, state: 'done' },
			...{ total: 2, done: 2, waiting: 0, failed: 0, passedOver: 0 }
		});
		const [then, now] = await Assessment.findAll({ where: { mountId: hot.id }, order: [['id', 'ASC']] });
		expect(now).toMatchObject({ bookId: book.id, createdBy: crew.manager.id });
		expect(now!.inputs.hotDay).toEqual(then!.inputs.hotDay);
		expect(now!.inputs.book.coefficients.bay!.share).toBe(0.15);
		expect(now!.peakCellsC).not.toBe(then!.peakCellsC);
		expect(await reproduceAssessment(crew.engineer, now!.id)).toMatchObject({
			same: true,
			inputsIntact: true
		});
		const item = await RerunItem.findOne({ where: { newAssessmentId: now!.id } });
		expect(item!.cutOutShare).toBeGreaterThanOrEqual(0);
		expect(item!.cutOutShare).toBeLessThanOrEqual(1);
		const speaking = await Assessment.max('headroomK', { where: { jobId, bookId: book.id } });
		expect(await Job.findByPk(jobId)).toMatchObject({ headroomK: speaking });
	}, 120_000);

	it('concerns the mounts that it is for, and those alone whose closest book it is', async () => {
		const crew = await makeCrew();
		const { hot, cool } = await makeAssessed(crew);
		const narrow = await putInForce(crew, 0.5, { positionKind: 'under-bonnet' });
		await finishReruns();
		await putInForce(crew, 0.55);
		await finishReruns();
		const items = await RerunItem.findAll({ where: { workshopId: crew.workshopId }, order: [['id', 'ASC']] });
		expect(items.map(({ mountId }) => mountId)).toEqual([hot.id, cool.id]);
		await moveBook(crew.manager, narrow.id, { to: 'withdrawn', version: narrow.version });
		await finishReruns();
		const [last] = await listReruns(crew.manager);
		expect(last).toMatchObject({ bookId: narrow.id, occasion: 'withdrawn', total: 1, done: 1 });
		const newest = await Assessment.findOne({ where: { mountId: hot.id }, order: [['id', 'DESC']] });
		expect(newest!.inputs.book.coefficients.bay!.share).toBe(0.55);
	}, 120_000);

	it('begins no re-run where nothing is concerned', async () => {
		const crew = await makeCrew();
		await makeAssessed(crew);
		await putInForce(crew, 0.5, { engineLayout: 'flat', positionKind: 'chassis-rail' });
		expect(await listReruns(crew.engineer)).toEqual([]);
	});
});

describe('a re-run', () => {
	it('passes over what was assessed anew or removed meanwhile, and says why one could not be run', async () => {
		const crew = await makeCrew();
		const { jobId, hot, cool } = await makeAssessed(crew, 1);
		await stopReruns();
		await putInForce(crew, 0.4);
		const [rerun] = await listReruns(crew.engineer);
		expect(rerun).toMatchObject({ state: 'running', total: 3, waiting: 3 });
		await assessJob(crew.installer, jobId);
		await removeMount(crew.installer, cool.id);
		await finishReruns();
		expect(await getRerun(crew.engineer, rerun!.id)).toMatchObject({ state: 'done', done: 0, passedOver: 3 });
		expect((await listLeft(crew.engineer, rerun!.id)).map(({ reason }) => reason)).toEqual([
			'It was assessed anew meanwhile.',
			'Its mount was removed meanwhile.',
			'It was assessed anew meanwhile.'
		]);
		expect(await Assessment.count({ where: { mountId: hot.id } })).toBe(2);
	}, 120_000);

	it('says of one that cannot be run why, and goes on with the others', async () => {
		const crew = await makeCrew();
		const { hot } = await makeAssessed(crew);
		const { id: _, ...kept } = (await Assessment.findOne({ where: { mountId: hot.id } }))!.get();
		await Assessment.create({
			...kept,
			inputs: { ...kept.inputs, dayPlan: { ...kept.inputs.dayPlan, legs: [] } }
		});
		await putInForce(crew, 0.4);
		await finishReruns();
		const [rerun] = await listReruns(crew.engineer);
		expect(rerun).toMatchObject({ state: 'done', done: 1, failed: 1 });
		expect(await listLeft(crew.engineer, rerun!.id)).toMatchObject([
			{ mountLetter: 'A', state: 'failed', reason: expect.stringMatching(/leg/i) }
		]);
	}, 120_000);

	it('says of a fault of ours that it is one, and tells the log alone what it was', async () => {
		const crew = await makeCrew();
		const { hot } = await makeAssessed(crew);
		const { id: _, ...kept } = (await Assessment.findOne({ where: { mountId: hot.id } }))!.get();
		const dayPlan = null as unknown as typeof kept.inputs.dayPlan;
		await Assessment.create({ ...kept, inputs: { ...kept.inputs, dayPlan } });
		const log = vi.spyOn(logger, 'error').mockReturnValue();
		await putInForce(crew, 0.4);
		await finishReruns();
		const logged = log.mock.calls;
		log.mockRestore();
		const [rerun] = await listReruns(crew.engineer);
		expect(rerun).toMatchObject({ state: 'done', done: 1, failed: 1 });
		const left = await listLeft(crew.engineer, rerun!.id);
		expect(left).toMatchObject([{ mountLetter: 'A', state: 'failed' }]);
		expect(left[0]!.reason).toMatch(/^It could not be assessed again, through a fault of ours\./);
		expect(left[0]!.reason).not.toMatch(/null|undefined|TypeError|legs/);
		const told = logged.find(([, words]) => words === 'a mount could not be assessed again');
		expect(told?.[0]).toMatchObject({ err: expect.stringContaining('TypeError') as string });
	}, 120_000);

	it('does not hold up those of other workshops when it cannot go on', async () => {
		const [stuck, other] = [await makeCrew(), await makeCrew()];
		for (const crew of [stuck, other]) await makeAssessed(crew);
		await stopReruns();
		for (const crew of [stuck, other]) await putInForce(crew, 0.4);
		// Without a book in force there is nothing to assess with.
		await CoefficientBook.update({ state: 'withdrawn' }, { where: { workshopId: stuck.workshopId } });
		await finishReruns();
		expect(await listReruns(stuck.engineer)).toMatchObject([{ state: 'running', done: 0 }]);
		expect(await listReruns(other.engineer)).toMatchObject([{ state: 'done', done: 2 }]);
		await Rerun.update({ state: 'cancelled' }, { where: { workshopId: stuck.workshopId } });
	}, 120_000);

	it('stops when it is called off, keeps what it made, and goes on where it was', async () => {
		const crew = await makeCrew();
		await makeAssessed(crew, 18);
		await stopReruns();
		await putInForce(crew, 0.4);
		const { id } = (await listReruns(crew.engineer))[0]!;
		await moveRerun(crew.engineer, id, { to: 'cancelled' });
		await finishReruns();
		expect(await getRerun(crew.engineer, id)).toMatchObject({ state: 'cancelled', done: 0, waiting: 20 });
		await moveRerun(crew.engineer, id, { to: 'running' });
		await finishReruns();
		expect(await getRerun(crew.engineer, id)).toMatchObject({ state: 'done', done: 20 });
		await expect(moveRerun(crew.engineer, id, { to: 'cancelled' })).rejects.toMatchObject({
			code: 'conflict'
		});
		expect(await countMade(crew)).toEqual({ items: 20, perMount: [1], told: 20 });
	}, 120_000);

	it('loses none and makes none twice when its process is killed, and another goes on with this one', async () => {
		const crew = await makeCrew();
		for (let job = 0; job < 5; job++) await makeAssessed(crew, 16);
		await stopReruns();
		await putInForce(crew, 0.4);
		const { id } = (await listReruns(crew.engineer))[0]!;
		const child = spawn(process.execPath, ['--import', 'tsx', 'tests/support/rerun-process.ts'], {
			stdio: 'ignore'
		});
		const ended = new Promise<NodeJS.Signals | null>((resolve) =>
			child.once('exit', (_code, signal) => resolve(signal))
		);
		const isDone = async () => (await RerunItem.count({ where: { rerunId: id, state: 'done' } })) > 0;
		await expect.poll(isDone, { timeout: 60_000, interval: 20 }).toBe(true);
		child.kill('SIGKILL');
		expect(await ended).toBe('SIGKILL');
		const { done, waiting } = await getRerun(crew.engineer, id);
		expect([done > 0, waiting > 0, done + waiting]).toEqual([true, true, 90]);
		await finishReruns();
		expect(await getRerun(crew.engineer, id)).toMatchObject({ state: 'done', done: 90, waiting: 0 });
		expect(await countMade(crew)).toEqual({ items: 90, perMount: [1], told: 90 });
		expect(await checkTrails([crew.workshopId])).toMatchObject([{ finding: null }]);
	}, 180_000);
});

describe('a verdict that changed', () => {
	async function changeOne(crew: Crew) {
		const { jobId } = await makeAssessed(crew);
		const job = await Job.findByPk(jobId);
		await Customer.update(
			{ email: `reader-${jobId}@travellers.example` },
			{ where: { id: job!.customerId } }
		);
		await putInForce(crew, 0.05, {}, { group: 'exhaust', key: 'emissivity' });
		await finishReruns();
		const [rerun] = await listReruns(crew.engineer);
		const { rows } = await listChanges(crew.engineer, rerun!.id, 1);
		return { rerun: rerun!, change: rows[0]!, rows, jobId };
	}

	it('is listed with before and after, who should know, and a letter to start from', async () => {
		const crew = await makeCrew();
		const { rerun, rows, change, jobId } = await changeOne(crew);
		expect(rerun).toMatchObject({ changed: 1, untold: 1 });
		expect(rows).toHaveLength(1);
		expect(change).toMatchObject({
			...{ jobId, mountLetter: 'A', before: { verdict: 'cuts-out' } },
			...{ recipient: `reader-${jobId}@travellers.example`, toldAt: null, isFitted: false, wasSent: false }
		});
		expect(change.after.verdict).not.toBe('cuts-out');
		expect(change.draft.body).toContain('we said that it cuts out');
		expect(change.draft.body).toContain('an estimate, not a certificate');
	}, 120_000);

	it('is told once, by the letter as somebody wrote it', async () => {
		const crew = await makeCrew();
		const { rerun, change, jobId } = await changeOne(crew);
		const where = { rerunId: rerun.id, itemId: change.id };
		const letter = {
			how: 'letter',
			subject: 'It got better',
			body: 'Good news.\n\nIt rides it out.'
		} as const;
		const told = await tellOfChange(crew.engineer, where, letter);
		expect(told).toMatchObject({ toldBy: crew.engineer.name, toldHow: 'letter' });
		const mails = await OutgoingMail.findAll({ where: { jobId, kind: 'verdict-changed' } });
		expect(mails).toMatchObject([{ subject: 'It got better', recipient: change.recipient }]);
		const again = tellOfChange(crew.manager, where, { how: 'otherwise' });
		await expect(again).rejects.toMatchObject({ code: 'conflict' });
		expect(await getRerun(crew.engineer, rerun.id)).toMatchObject({ changed: 1, untold: 0 });
	}, 120_000);

	it('is not told by letter once another assessment has overtaken it', async () => {
		const crew = await makeCrew();
		const { rerun, change } = await changeOne(crew);
		const item = await RerunItem.findByPk(change.id);
		await Job.update({ hotDayMaxC: 30 }, { where: { id: item!.jobId } });
		await assessMount(crew.installer, { mountId: item!.mountId });
		const where = { rerunId: rerun.id, itemId: change.id };
		const letter = { how: 'letter', subject: 'It got better', body: 'It rides it out.' } as const;
		await expect(tellOfChange(crew.engineer, where, letter)).rejects.toMatchObject({ code: 'conflict' });
		expect(await OutgoingMail.count({ where: { jobId: item!.jobId, kind: 'verdict-changed' } })).toBe(0);
		expect(await tellOfChange(crew.engineer, where, { how: 'otherwise' })).toMatchObject({
			toldHow: 'otherwise'
		});
	}, 120_000);

	it('is nobody else’s: no installer’s, and no other workshop’s', async () => {
		const crew = await makeCrew();
		const { rerun, change } = await changeOne(crew);
		const where = { rerunId: rerun.id, itemId: change.id };
		const { engineer: neighbour } = await makeCrew();
		await expect(getRerun(crew.installer, rerun.id)).rejects.toMatchObject({ code: 'not_allowed' });
		const asked: (() => Promise<unknown>)[] = [
			() => getRerun(neighbour, rerun.id),
			() => listChanges(neighbour, rerun.id, 1),
			() => listLeft(neighbour, rerun.id),
			() => moveRerun(neighbour, rerun.id, { to: 'cancelled' }),
			() => tellOfChange(neighbour, where, { how: 'otherwise' })
		];
		for (const ask of asked) await expect(ask()).rejects.toMatchObject({ code: 'not_found' });
		expect(await Rerun.count({ where: { id: rerun.id, state: 'done' } })).toBe(1);
	}, 120_000);
});
