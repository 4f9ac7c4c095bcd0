import { Op } from 'sequelize';
import { sayAgainst } from '$lib/format/recommendations';
import type { AssessmentView, MountOutcome } from '$lib/schemas/assessments';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	FEWEST_CHARACTERS,
	findAgainst,
	type RecommendationDocument,
	type RecommendationInput,
	type RecommendationView
} from '$lib/schemas/recommendations';
import { Assessment, Customer, Job, Mount, Person, Recommendation, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound, type FieldProblem } from '../errors';
import { allow } from '../policies';
import { presentRecommendation } from '../presenters/recommendations';
import { getAssessment, presentRows } from './assessments';
import { recordBy } from './audit';
import { listIssuedCautions } from './caution-texts';
import { WITHOUT_TEXTS, newestByMount, updateJobOutcome } from './job-outcome';
import { snapshotPreDrill } from './pre-drill';
import { findAddressee, findAftermath } from './recommendation-history';
import { findLogo, headOf } from './shop';
import { refreshReview } from './review/keep-review';

async function show(recommendation: Recommendation): Promise<RecommendationView> {
	const { jobId, assessmentId, createdBy } = recommendation;
	const job = await Job.findByPk(jobId);
	const author = await Person.findByPk(createdBy);
	const assessment = await Assessment.findByPk(assessmentId, { attributes: WITHOUT_TEXTS });
	const [row] = assessment ? await presentRows([assessment]) : [];
	const customer = job && (await Customer.findByPk(job.customerId));
	if (!customer || !row) throw notFound('recommendation');
	return presentRecommendation(recommendation, {
		jobNumber: job.number,
		assessment: row,
		recommendedBy: author?.name ?? '',
		...(await findAddressee(recommendation, customer)),
		...(await findAftermath(recommendation, row.mountId))
	});
}

const OVERRIDE_WORDS = {
	decidedBy: {
		label: 'Who decided',
		missing: (against: string) => `Say who decided to go ahead although ${against}.`
	},
	reason: { label: 'Reason', missing: (against: string) => `Say why it goes ahead although ${against}.` }
} as const;

/** What is wrong with one of the two answers, or nothing. */
function refuseWords(path: keyof typeof OVERRIDE_WORDS, given: string, against: string): FieldProblem[] {
	const [fewest, { label, missing }] = [FEWEST_CHARACTERS[path], OVERRIDE_WORDS[path]];
	if (given.length >= fewest) return [];
	const tooShort = `${label} must have at least ${fewest} characters: “${given}” has ${given.length}.`;
	return [{ path, message: given === '' ? missing(against) : tooShort, limit: `at least ${fewest}` }];
}

/** Against "cuts out" or the maker's word, the two answers that it takes; else nobody decides against anything. */
function readOverride(assessment: AssessmentView, input: RecommendationInput) {
	const against = findAgainst(assessment);
	const words = sayAgainst(against, assessment);
	if (words === '') return { ...against, decidedBy: null, reason: null };
	const decidedBy = input.decidedBy?.trim() ?? '';
	const reason = input.reason?.trim() ?? '';
	const problems = [...refuseWords('decidedBy', decidedBy, words), ...refuseWords('reason', reason, words)];
	if (problems.length > 0) throw new AppError('invalid_input', problems[0]!.message, problems);
	return { ...against, decidedBy, reason };
}

/** Numbers count within a job; whoever asks holds the job. */
async function nextNumber(jobId: number): Promise<number> {
	return 1 + ((await Recommendation.max<number | null, Recommendation>('number', { where: { jobId } })) ?? 0);
}

function requireCurrent({ isCurrent }: AssessmentView): void {
	if (isCurrent) return;
	throw new AppError(
		'conflict',
		'The assessment is out of date: the job, the coefficient book or the engine has changed since. Assess the mount again first.'
	);
}

/** Recommends what was assessed, and keeps it for good. Going ahead against "cuts out" or the maker's word takes a person and a reason. */
export async function makeRecommendation(
	person: SignedInPerson,
	input: RecommendationInput
): Promise<RecommendationView> {
	allow(person, 'recommendations.write');
	return inTransaction(async (transaction) => {
		const assessment = await getAssessment(person, input.assessmentId);
		const override = readOverride(assessment, input);
		requireCurrent(assessment);
		const { workshopId } = person;
		const job = await Job.findOne({ where: { id: assessment.jobId, workshopId }, lock: true });
		if (!job) throw notFound('job');
		const { name: madeOutTo } = (await Customer.findByPk(job.customerId))!;
		const preDrill = await snapshotPreDrill(person, assessment.mountId);
		const cautions = await listIssuedCautions(workshopId, person.workshopName, assessment.chemistry);
		const made = {
			workshopId,
			jobId: job.id,
			number: await nextNumber(job.id),
			assessmentId: assessment.id,
			createdBy: person.id
		};
		const recommendation = await Recommendation.create(
			{ ...made, ...override, madeOutTo, preDrill, cautions },
			{ transaction }
		);
		await updateJobOutcome(job, transaction, 'recommended');
		await refreshReview('assessment', assessment.id, transaction);
		const subject = { type: 'recommendation', id: recommendation.id };
		const detail = {
			jobId: job.id,
			assessmentId: assessment.id,
			verdict: assessment.verdict,
			...override,
			preDrill
		};
		await recordBy(person, 'recommendation.made', subject, transaction, detail);
		return show(recommendation);
	});
}

async function findRecommendation(person: SignedInPerson, id: number): Promise<Recommendation> {
	const recommendation = await Recommendation.findOne({ where: { id, workshopId: person.workshopId } });
	if (!recommendation) throw notFound('recommendation');
	return recommendation;
}

export async function getRecommendation(
	person: SignedInPerson,
	recommendationId: number
): Promise<RecommendationView> {
	allow(person, 'assessments.read');
	return show(await findRecommendation(person, recommendationId));
}

/** The newest recommendation of a job, or none. */
export async function newestRecommendation(
	person: SignedInPerson,
	jobId: number
): Promise<RecommendationView | null> {
	allow(person, 'assessments.read');
	const where = { jobId, workshopId: person.workshopId };
	const newest = await Recommendation.findOne({ where, order: [['id', 'DESC']] });
	return newest ? show(newest) : null;
}

/** Every recommendation of a job, the newest first. */
export async function listRecommendations(
	person: SignedInPerson,
	jobId: number
): Promise<RecommendationView[]> {
	allow(person, 'assessments.read');
	const where = { jobId, workshopId: person.workshopId };
	const made = await Recommendation.findAll({ where, order: [['id', 'DESC']] });
	return Promise.all(made.map(show));
}

/** The job's other mounts as they stood at that moment: a reprint says what the first print said. */
async function othersThen({ jobId, createdAt }: Recommendation, chosenId: number): Promise<MountOutcome[]> {
	const mounts = await Mount.findAll({
		where: {
			jobId,
			id: { [Op.ne]: chosenId },
			createdAt: { [Op.lte]: createdAt },
			removedAt: { [Op.or]: [{ [Op.is]: null }, { [Op.gt]: createdAt }] }
		},
		order: [['letter', 'ASC']]
	});
	const newest = await newestByMount(jobId, createdAt);
	const rows = new Map((await presentRows([...newest.values()])).map((row) => [row.mountId, row]));
	return mounts.map(({ id: mountId, letter, name, surveyComplete }) => ({
		...{ mountId, letter, name, surveyComplete },
		assessment: rows.get(mountId) ?? null
	}));
}

/** Everything that the printed recommendation says. */
export async function getRecommendationDocument(
	person: SignedInPerson,
	recommendationId: number
): Promise<RecommendationDocument> {
	allow(person, 'assessments.read');
	const row = await findRecommendation(person, recommendationId);
	const recommendation = await show(row);
	const assessment = await getAssessment(person, row.assessmentId);
	const workshop = await Workshop.findByPk(person.workshopId);
	const job = await Job.findByPk(row.jobId);
	const customer = job && (await Customer.findByPk(job.customerId));
	if (!workshop || !customer) throw notFound('recommendation');
	return {
		recommendation,
		assessment,
		workshop: headOf(workshop),
		logo: await findLogo(workshop.id, workshop.logoSha256),
		customer: { phone: customer.phone, email: customer.email },
		others: await othersThen(row, assessment.mountId)
	};
}
