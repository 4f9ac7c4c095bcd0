import { listCautions } from '$lib/format/cautions';
import type {
	AssessmentInputs,
	AssessmentRow,
	AssessmentView,
	MountOutcome,
	Reproduction
} from '$lib/schemas/assessments';
import { isExcludedAt } from '$lib/schemas/batteries';
import type { SignedInPerson } from '$lib/schemas/people';
import { ENGINE_VERSION } from '$lib/thermal';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import { Assessment, CoefficientBook, Job, Mount, Person } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { canonicalJson } from '../hash';
import { allow } from '../policies';
import { presentAssessment, presentAssessmentRow } from '../presenters/assessments';
import { askToHold } from './accuracy/ask-to-hold';
import { caseOf, findJobParts, gatherInputs, isAssessable } from './assessment-inputs';
import { assessMounts } from './assessment-runs';
import { bookInForce } from './books';
import { WITHOUT_TEXTS, newestByMount } from './job-outcome';
import { hashInputs, runInputs, scenarioOf } from './run-inputs';

async function findJob(person: SignedInPerson, jobId: number, lock = false): Promise<Job> {
	const job = await Job.findOne({ where: { id: jobId, workshopId: person.workshopId }, lock });
	if (!job) throw notFound('job');
	return job;
}

async function findAssessment(person: SignedInPerson, assessmentId: number): Promise<Assessment> {
	const where = { id: assessmentId, workshopId: person.workshopId };
	const assessment = await Assessment.findOne({ where });
	if (!assessment) throw notFound('assessment');
	return assessment;
}

/** Whether assessing its mount now would run the very same scenario on the same engine, with the same year, cable, limits and word of the maker. */
async function isCurrent(person: SignedInPerson, assessment: Assessment): Promise<boolean> {
	if (assessment.engineVersion !== ENGINE_VERSION) return false;
	const { workshopId } = person;
	const mount = await Mount.findOne({ where: { id: assessment.mountId, workshopId, removedAt: null } });
	if (!mount) return false;
	const parts = await findJobParts(await findJob(person, assessment.jobId));
	if (!isAssessable(parts, mount)) return false;
	const now = gatherInputs(parts, mount, await bookInForce(person, caseOf(parts, mount)));
	// Beside what an older assessment did not keep there is nothing to compare.
	const withYear = assessment.inputs.touring !== undefined;
	const judged = ({ scenario, battery, cable, touring, mount: { survey } }: AssessmentInputs): string =>
		canonicalJson({
			...{ scenario, limits: heatLimitsOf(battery), cable: cable ?? null },
			isExcluded: isExcludedAt(battery, survey.positionKind),
			...(withYear && touring ? { months: touring.months, daysOnRoad: touring.daysOnRoad } : {})
		});
	return judged(now) === judged(assessment.inputs);
}

async function show(person: SignedInPerson, assessment: Assessment): Promise<AssessmentView> {
	const author = await Person.findByPk(assessment.createdBy);
	return presentAssessment(assessment, {
		assessedBy: author?.name ?? '',
		isCurrent: await isCurrent(person, assessment),
		cautions: listCautions(assessment.inputs.battery.chemistry).map(({ id }) => id)
	});
}

/**
 * Assesses one mount of a job as it stands now, and keeps everything that went in beside what came out.
 * A run that cannot be finished stores nothing.
 */
export async function assessMount(
	person: SignedInPerson,
	{ mountId }: { mountId: number }
): Promise<AssessmentView> {
	allow(person, 'assessments.run');
	return inTransaction(async (transaction) => {
		const { workshopId } = person;
		const mount = await Mount.findOne({ where: { id: mountId, workshopId, removedAt: null } });
		if (!mount) throw notFound('mount');
		const job = await findJob(person, mount.jobId, true);
		const [made] = await assessMounts(person, job, [mount], transaction);
		await askToHold('mount', mountId, transaction);
		return show(person, made!);
	});
}

/** Assesses every mount of a job whose survey is finished: all of them, or none. */
export async function assessJob(person: SignedInPerson, jobId: number): Promise<AssessmentView[]> {
	allow(person, 'assessments.run');
	return inTransaction(async (transaction) => {
		const job = await findJob(person, jobId, true);
		const mounts = await Mount.findAll({
			where: { jobId, workshopId: person.workshopId, removedAt: null, surveyComplete: true },
			order: [['letter', 'ASC']]
		});
		if (mounts.length === 0) {
			const message = 'No mount of this job has a finished survey yet.';
			throw new AppError('conflict', message, [{ path: 'survey', message }]);
		}
		const made: AssessmentView[] = [];
		for (const each of await assessMounts(person, job, mounts, transaction)) {
			await askToHold('mount', each.mountId, transaction);
			made.push(await show(person, each));
		}
		return made;
	});
}

export async function getAssessment(person: SignedInPerson, assessmentId: number): Promise<AssessmentView> {
	allow(person, 'assessments.read');
	return show(person, await findAssessment(person, assessmentId));
}

/** Rows with the names that other tables hold, read once for all of them. */
export async function presentRows(assessments: Assessment[]): Promise<AssessmentRow[]> {
	const mounts = await Mount.findAll({ where: { id: assessments.map(({ mountId }) => mountId) } });
	const books = await CoefficientBook.findAll({ where: { id: assessments.map(({ bookId }) => bookId) } });
	const mountOf = new Map(mounts.map((mount) => [mount.id, mount]));
	const numberOf = new Map(books.map(({ id, number }) => [id, number]));
	return assessments.map((assessment) => {
		const mount = mountOf.get(assessment.mountId);
		return presentAssessmentRow(assessment, {
			mountLetter: mount?.letter ?? '',
			mountName: mount?.name ?? '',
			bookNumber: numberOf.get(assessment.bookId) ?? 0
		});
	});
}

/** All assessments of a job, newest first. */
export async function listAssessments(person: SignedInPerson, jobId: number): Promise<AssessmentRow[]> {
	allow(person, 'assessments.read');
	const { id } = await findJob(person, jobId);
	const assessments = await Assessment.findAll({
		where: { jobId: id },
		attributes: WITHOUT_TEXTS,
		order: [['id', 'DESC']]
	});
	return presentRows(assessments);
}

/** The mounts that stand in a job, each with its newest assessment or none. */
export async function listMountOutcomes(person: SignedInPerson, jobId: number): Promise<MountOutcome[]> {
	allow(person, 'assessments.read');
	const { id } = await findJob(person, jobId);
	const mounts = await Mount.findAll({
		where: { jobId: id, removedAt: null },
		order: [['letter', 'ASC']]
	});
	const newest = await newestByMount(id);
	const rows = new Map((await presentRows([...newest.values()])).map((row) => [row.mountId, row]));
	return mounts.map(({ id: mountId, letter, name, surveyComplete }) => ({
		...{ mountId, letter, name, surveyComplete },
		assessment: rows.get(mountId) ?? null
	}));
}

/** Makes an assessment again from what was stored with it, and compares every digit. Stores nothing. */
export async function reproduceAssessment(
	person: SignedInPerson,
	assessmentId: number
): Promise<Reproduction> {
	allow(person, 'assessments.read');
	const { inputs, inputsSha256, result, engineVersion } = await findAssessment(person, assessmentId);
	const again = { ...inputs, ...scenarioOf(inputs) };
	return {
		same: canonicalJson(runInputs(again)) === canonicalJson(result),
		inputsIntact: hashInputs(inputs) === inputsSha256,
		engineThen: engineVersion,
		engineNow: ENGINE_VERSION
	};
}
