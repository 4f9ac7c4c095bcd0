import { isDeepStrictEqual } from 'node:util';
import type { Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	findOpenItems,
	keepQuotes,
	listAsked,
	type PreDrillAnswers,
	type PreDrillChange,
	type PreDrillSignature,
	type PreDrillSnapshot,
	type PreDrillView
} from '$lib/schemas/pre-drill';
import {
	preDrillQuestionsFor,
	type PreDrillCase,
	type PreDrillQuestion
} from '$lib/schemas/pre-drill-questions';
import type { SurveyAnswers } from '$lib/schemas/survey';
import { BatteryRecord, Job, PreDrillCheck, type Mount } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError } from '../errors';
import { allow } from '../policies';
import { presentPreDrill, presentSnapshot } from '../presenters/pre-drill';
import { recordBy } from './audit';
import { findStandingMount } from './mounts';
import { saveVersioned } from './records';

const NO_BATTERY = 'The questions depend on the battery: choose the battery of the job first.';

interface Asked {
	mount: Mount;
	/** None while the job has no battery. */
	questions: PreDrillQuestion[] | null;
}

/** What the questions depend on, of a battery and where it is to go. */
export const caseOf = (
	{ chemistry, capacityAh, underBonnet, underBonnetWords }: Omit<PreDrillCase, 'positionKind' | 'survey'>,
	survey: SurveyAnswers
): PreDrillCase => ({
	...{ chemistry, capacityAh, underBonnet, underBonnetWords, survey },
	positionKind: survey.positionKind
});

async function findMount(person: SignedInPerson, mountId: number): Promise<Asked> {
	const mount = await findStandingMount(person, mountId);
	const job = await Job.findByPk(mount.jobId, { attributes: ['batteryRecordId'] });
	const battery = job?.batteryRecordId ? await BatteryRecord.findByPk(job.batteryRecordId) : null;
	if (!battery) return { mount, questions: null };
	const { positionKind, survey } = mount;
	return { mount, questions: preDrillQuestionsFor(caseOf(battery, { ...survey, positionKind })) };
}

async function findAsked(person: SignedInPerson, mountId: number) {
	const { mount, questions } = await findMount(person, mountId);
	if (!questions) throw new AppError('conflict', NO_BATTERY);
	return { mount, questions };
}

/** The questions of a mount as its job stands; none yet without a battery. */
export async function listPreDrillQuestions(
	person: SignedInPerson,
	mountId: number
): Promise<PreDrillQuestion[]> {
	allow(person, 'jobs.read');
	return (await findMount(person, mountId)).questions ?? [];
}

/** The check of what was fitted, whatever battery the job has by now. */
export async function getPreDrillOf(
	person: SignedInPerson,
	mountId: number,
	fitted: PreDrillCase
): Promise<PreDrillView> {
	allow(person, 'jobs.read');
	await findStandingMount(person, mountId);
	return presentPreDrill(mountId, preDrillQuestionsFor(fitted), await findCheck(mountId));
}

const findCheck = (mountId: number): Promise<PreDrillCheck | null> =>
	PreDrillCheck.findOne({ where: { mountId } });

/** The questions before drilling for a mount, with the answers so far. */
export async function getPreDrill(person: SignedInPerson, mountId: number): Promise<PreDrillView> {
	allow(person, 'jobs.read');
	const { questions } = await findAsked(person, mountId);
	return presentPreDrill(mountId, questions, await findCheck(mountId));
}

/** The row of a mount, made when there is none yet. */
async function holdCheck(
	{ id: mountId, workshopId }: Mount,
	transaction: Transaction
): Promise<PreDrillCheck> {
	const [check] = await PreDrillCheck.findOrCreate({
		where: { mountId },
		defaults: { workshopId, mountId, answers: {} },
		transaction
	});
	return check;
}

function refuseUnasked(questions: readonly PreDrillQuestion[], answers: PreDrillAnswers): void {
	const asked = new Set(questions.map(({ key }) => key));
	const problems = Object.keys(answers)
		.filter((key) => !asked.has(key))
		.map((key) => ({ path: `answers.${key}`, message: 'This is not asked for this position and battery.' }));
	if (problems.length > 0) throw new AppError('invalid_input', problems[0]!.message, problems);
}

/** Keeps the answers. What was signed is not signed any more once an answer is another. */
export async function savePreDrill(
	person: SignedInPerson,
	mountId: number,
	{ answers, version }: PreDrillChange
): Promise<PreDrillView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const { mount, questions } = await findAsked(person, mountId);
		refuseUnasked(questions, answers);
		const check = await holdCheck(mount, transaction);
		const kept = keepQuotes(questions, answers);
		const unsigned = isDeepStrictEqual(check.answers, kept)
			? {}
			: { signedBy: null, signedAt: null, signedFor: null };
		await saveVersioned(check, 'check', version, { answers: kept, ...unsigned }, transaction);
		const subject = { type: 'mount', id: mountId };
		await recordBy(person, 'mount.pre-drill', subject, transaction, { answers });
		return presentPreDrill(mountId, questions, check);
	});
}

/** Puts a name and the time under the answers as they stand, open ones included. */
export async function signPreDrill(
	person: SignedInPerson,
	mountId: number,
	{ name, version }: PreDrillSignature
): Promise<PreDrillView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const { mount, questions } = await findAsked(person, mountId);
		const check = await holdCheck(mount, transaction);
		if (Object.keys(check.answers).length === 0) {
			throw new AppError('conflict', 'Nothing is answered yet: there is nothing to sign.');
		}
		const signature = { signedBy: name, signedAt: new Date(), signedFor: listAsked(questions) };
		await saveVersioned(check, 'check', version, signature, transaction);
		const open = findOpenItems(questions, check.answers).map(({ key }) => key);
		const subject = { type: 'mount', id: mountId };
		await recordBy(person, 'mount.pre-drill-signed', subject, transaction, { name, open });
		return presentPreDrill(mountId, questions, check);
	});
}

/** Keeps the answers and puts a name under them, or does neither. */
export async function saveAndSignPreDrill(
	person: SignedInPerson,
	mountId: number,
	{ name, ...change }: PreDrillChange & Pick<PreDrillSignature, 'name'>
): Promise<PreDrillView> {
	allow(person, 'mounts.write');
	return inTransaction(async () => {
		const { version } = await savePreDrill(person, mountId, change);
		return signPreDrill(person, mountId, { name, version });
	});
}

/** What a recommendation for the mount says of its check: as it stands at this moment. */
export async function snapshotPreDrill(person: SignedInPerson, mountId: number): Promise<PreDrillSnapshot> {
	const { questions } = await findAsked(person, mountId);
	return presentSnapshot(questions, await findCheck(mountId));
}
