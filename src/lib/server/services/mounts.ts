import type { Transaction } from 'sequelize';
import type { CableChange } from '$lib/schemas/cables';
import { MAX_MOUNTS, type MountInput, type MountSurvey, type MountView } from '$lib/schemas/mounts';
import type { SignedInPerson } from '$lib/schemas/people';
import type { SurveyAnswers } from '$lib/schemas/survey';
import { describeAnswer, questionsFor } from '$lib/thermal/survey';
import { Job, Mount } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { presentMount } from '../presenters/mounts';
import { holdMountAnew } from './accuracy/ask-to-hold';
import { recordBy } from './audit';
import { saveVersioned } from './records';
import { refreshReview } from './review/keep-review';

const LETTERS = [...'ABCDEFGHIJKLMNOPQRSTUVWXYZ'];

/** Holds the job while its mounts are counted, so that two people cannot both take the last letter. */
async function holdJob(person: SignedInPerson, jobId: number, transaction: Transaction): Promise<void> {
	const where = { id: jobId, workshopId: person.workshopId };
	const job = await Job.findOne({ where, attributes: ['id'], transaction, lock: transaction.LOCK.UPDATE });
	if (!job) throw notFound('job');
}

async function mountsOf(jobId: number, transaction: Transaction): Promise<Mount[]> {
	return Mount.findAll({ where: { jobId }, attributes: ['id', 'letter', 'removedAt'], transaction });
}

function refuseTooMany(mounts: Mount[]): void {
	if (mounts.filter((mount) => mount.removedAt === null).length < MAX_MOUNTS) return;
	throw new AppError('conflict', `A job compares at most ${MAX_MOUNTS} positions: remove one first.`);
}

/** A letter stays with its mount even when that is removed: what was printed must never mean another place. */
function nextLetter(mounts: Mount[]): string {
	const taken = new Set(mounts.map((mount) => mount.letter));
	const letter = LETTERS.find((candidate) => !taken.has(candidate));
	if (letter) return letter;
	throw new AppError('conflict', 'This job has used all letters from A to Z: begin another job.');
}

async function findMount(person: SignedInPerson, mountId: number, transaction?: Transaction): Promise<Mount> {
	const where = { id: mountId, workshopId: person.workshopId };
	const mount = await Mount.findOne({ where, ...(transaction ? { transaction } : {}) });
	if (!mount) throw notFound('mount');
	return mount;
}

/** A mount that was removed is not there, except for who puts it back. */
export async function findStandingMount(
	person: SignedInPerson,
	mountId: number,
	transaction?: Transaction
): Promise<Mount> {
	const mount = await findMount(person, mountId, transaction);
	if (mount.removedAt !== null) throw notFound('mount');
	return mount;
}

export async function listMounts(person: SignedInPerson, jobId: number): Promise<MountView[]> {
	allow(person, 'jobs.read');
	const { workshopId } = person;
	const job = await Job.findOne({ where: { id: jobId, workshopId }, attributes: ['id'] });
	if (!job) throw notFound('job');
	const where = { jobId, workshopId, removedAt: null };
	const mounts = await Mount.findAll({ where, order: [['letter', 'ASC']] });
	return mounts.map(presentMount);
}

export async function getMount(person: SignedInPerson, mountId: number): Promise<MountView> {
	allow(person, 'jobs.read');
	return presentMount(await findStandingMount(person, mountId));
}

export async function addMount(person: SignedInPerson, jobId: number, input: MountInput): Promise<MountView> {
	allow(person, 'mounts.write');
	const { workshopId } = person;
	const { name, positionKind } = input;
	return inTransaction(async (transaction) => {
		await holdJob(person, jobId, transaction);
		const others = await mountsOf(jobId, transaction);
		refuseTooMany(others);
		const mount = await Mount.create(
			{ workshopId, jobId, letter: nextLetter(others), name, positionKind, survey: { positionKind } },
			{ transaction }
		);
		const { letter } = mount;
		const detail = { jobId, letter, name, positionKind };
		await recordBy(person, 'mount.added', { type: 'mount', id: mount.id }, transaction, detail);
		return presentMount(mount);
	});
}

/** A survey is finished when every question has an answer; "I do not know" is one. */
function refuseUnanswered(survey: SurveyAnswers): void {
	const answers = questionsFor(survey.positionKind).flatMap((question) => describeAnswer(question, survey));
	const problems = answers
		.filter(({ answer }) => answer === null)
		.map(({ key, label }) => ({
			path: `survey.${key}`,
			message: `${label} is not answered yet: answer it, or say that you do not know.`
		}));
	if (problems.length > 0) {
		throw new AppError('invalid_input', 'The survey is not finished: answers are missing.', problems);
	}
}

export async function saveSurvey(
	person: SignedInPerson,
	mountId: number,
	{ survey, complete, version }: MountSurvey
): Promise<MountView> {
	allow(person, 'mounts.write');
	if (complete) refuseUnanswered(survey);
	const { positionKind } = survey;
	return inTransaction(async (transaction) => {
		const mount = await findStandingMount(person, mountId, transaction);
		const changes = { survey, positionKind, surveyComplete: complete };
		await saveVersioned(mount, 'survey', version, changes, transaction);
		const subject = { type: 'mount', id: mount.id };
		await recordBy(person, 'mount.surveyed', subject, transaction, { complete, survey: { ...survey } });
		return presentMount(mount);
	});
}

/** Keeps the cable and fuse that are proposed for a mount, or takes the proposal back. */
export async function saveCable(
	person: SignedInPerson,
	mountId: number,
	{ cable, version }: CableChange
): Promise<MountView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const mount = await findStandingMount(person, mountId, transaction);
		await saveVersioned(mount, 'cable', version, { cable }, transaction);
		await recordBy(person, 'mount.cable', { type: 'mount', id: mount.id }, transaction, { cable });
		return presentMount(mount);
	});
}

export async function removeMount(person: SignedInPerson, mountId: number): Promise<MountView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const mount = await findStandingMount(person, mountId, transaction);
		await mount.update({ removedAt: new Date() }, { transaction });
		await refreshReview('mount', mount.id, transaction);
		await holdMountAnew(mount.id, transaction);
		await recordBy(person, 'mount.removed', { type: 'mount', id: mount.id }, transaction);
		return presentMount(mount);
	});
}

/** Puts a removed mount back, its letter and answers as they were; one that stands is left alone. */
export async function restoreMount(person: SignedInPerson, mountId: number): Promise<MountView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const { jobId } = await findMount(person, mountId, transaction);
		await holdJob(person, jobId, transaction);
		const mount = await findMount(person, mountId, transaction);
		if (mount.removedAt === null) return presentMount(mount);
		refuseTooMany(await mountsOf(jobId, transaction));
		await mount.update({ removedAt: null }, { transaction });
		await refreshReview('mount', mount.id, transaction);
		await holdMountAnew(mount.id, transaction);
		await recordBy(person, 'mount.restored', { type: 'mount', id: mount.id }, transaction);
		return presentMount(mount);
	});
}
