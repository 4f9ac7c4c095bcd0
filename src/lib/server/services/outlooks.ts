import { UniqueConstraintError } from 'sequelize';
import type { AssessmentInputs } from '$lib/schemas/assessments';
import type { Outlook } from '$lib/schemas/outlooks';
import type { SignedInPerson } from '$lib/schemas/people';
import { parseScenario } from '$lib/thermal';
import { watchUseLimit } from '$lib/thermal/assess';
import { heatLimitsOf, wearOf } from '$lib/thermal/chemistries';
import {
	FULL_EFFORT,
	LIGHT_EFFORT,
	makeOutlook,
	type OutlookEffort,
	type OutlookProgress,
	type OutlookRequest
} from '$lib/thermal/outlook';
import { spreadDay } from '$lib/thermal/uncertainty';
import { Assessment, AssessmentOutlook } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { notFound } from '../errors';
import { allow } from '../policies';
import { remedyListOf } from './remedy-lists';
import { refreshReview } from './review/keep-review';
import { afterOthers, workInSlices } from './slices';
import { touringOf } from './touring-year';

/** One dark day in twenty is still called riding it out. */
const MOST_CUT_OUT_SHARE = 0.05;
const NOMINAL_V = 12.8;
/** A drop that is usually accepted between battery and charger or loads: common practice. */
const ACCEPTED_DROP = 0.04;

function cableOf({ cable, dayPlan }: AssessmentInputs): OutlookRequest['cable'] {
	if (!cable) return null;
	const { fuseRatedA, areaMm2, insulationC, laying, conductorLengthM } = cable;
	const continuousA = Math.max(dayPlan.chargerMaxA, ...dayPlan.legs.map(({ loadA }) => loadA));
	return {
		...{ areaMm2, insulationC, laying, conductorLengthM, fuseRatedA, continuousA },
		nominalV: NOMINAL_V,
		acceptedDrop: ACCEPTED_DROP
	};
}

async function requestFor(assessment: Assessment, effort: OutlookEffort): Promise<OutlookRequest> {
	const { id, workshopId, inputs } = assessment;
	const limits = heatLimitsOf(inputs.battery);
	const { moneyPerHour, offers } = await remedyListOf(workshopId);
	return {
		scenario: watchUseLimit(parseScenario(inputs.scenario), limits),
		limits,
		year: touringOf(inputs),
		wear: wearOf(inputs.battery),
		offers: offers.map(({ key, cost, hours, offered }) => ({ key, cost, hours, offered })),
		moneyPerHour,
		cable: cableOf(inputs),
		// Any number does; the assessment's own gives the same digits each time.
		seed: id,
		effort,
		mostCutOutShare: MOST_CUT_OUT_SHARE
	};
}

interface Running {
	done: Promise<Outlook>;
	progress: OutlookProgress;
	listeners: Set<(progress: OutlookProgress) => void>;
}

/** What is being worked out now, by assessment. */
const running = new Map<number, Running>();

async function store(assessment: Assessment, request: OutlookRequest, outlook: Outlook): Promise<Outlook> {
	const { id: assessmentId, workshopId, mountId } = assessment;
	const row = { workshopId, assessmentId, engineVersion: outlook.engineVersion, request, outlook };
	try {
		await inTransaction(async (transaction) => {
			await AssessmentOutlook.create(row, { transaction });
			// By its mount: what was noted there may be held against an assessment that was not the one agreed on.
			await refreshReview('mount', mountId, transaction);
		});
		return outlook;
	} catch (error) {
		// Another process was first: what it kept counts.
		if (!(error instanceof UniqueConstraintError)) throw error;
		return (await AssessmentOutlook.findOne({ where: { assessmentId } }))!.outlook;
	}
}

const usualEffort = (): OutlookEffort => (env().SOAKLINE_OUTLOOK === 'light' ? LIGHT_EFFORT : FULL_EFFORT);

function begin(assessment: Assessment, effort: OutlookEffort): Running {
	const work: Running = {
		done: Promise.resolve(null as never),
		progress: { part: 'day', share: 0 },
		listeners: new Set()
	};
	work.done = afterOthers(async () => {
		const request = await requestFor(assessment, effort);
		const outlook = await workInSlices(makeOutlook(request), (progress) => {
			work.progress = progress;
			for (const tell of work.listeners) tell(progress);
		});
		return store(assessment, request, outlook);
	}).finally(() => running.delete(assessment.id));
	running.set(assessment.id, work);
	return work;
}

/** The outlook of an assessment, if it has been worked out. */
export async function findOutlook(assessmentId: number): Promise<Outlook | null> {
	const row = await AssessmentOutlook.findOne({ where: { assessmentId } });
	return row?.outlook ?? null;
}

/** The outlook of an assessment: what is kept, or worked out now and kept. Two who ask at once wait for the same work. */
export async function ensureOutlook(assessment: Assessment, effort = usualEffort()): Promise<Outlook> {
	const kept = await findOutlook(assessment.id);
	if (kept) return kept;
	return (running.get(assessment.id) ?? begin(assessment, effort)).done;
}

/** The same with its fifty days: drawn again, with the same seed, for an outlook that was kept before they were. */
export async function withHottestDays(assessmentId: number, outlook: Outlook): Promise<Outlook> {
	if (outlook.day.hottest) return outlook;
	const row = await AssessmentOutlook.findOne({ where: { assessmentId } });
	if (!row) return outlook;
	const { samples, seed } = outlook.day;
	const { hottest } = await afterOthers(() =>
		workInSlices(spreadDay(row.request.scenario, { samples, seed }))
	);
	return { ...outlook, day: { ...outlook.day, ...(hottest ? { hottest } : {}) } };
}

async function findOwn(person: SignedInPerson, assessmentId: number): Promise<Assessment> {
	const assessment = await Assessment.findOne({ where: { id: assessmentId, workshopId: person.workshopId } });
	if (!assessment) throw notFound('assessment');
	return assessment;
}

/** What an assessment says beside its number; worked out at the first asking, which takes some seconds. */
export async function getOutlook(person: SignedInPerson, assessmentId: number): Promise<Outlook> {
	allow(person, 'assessments.read');
	return ensureOutlook(await findOwn(person, assessmentId));
}

/** What is kept of these assessments, and of no other workshop's; nothing is begun. */
export async function listKeptOutlooks(
	person: SignedInPerson,
	assessmentIds: number[]
): Promise<Map<number, Outlook>> {
	allow(person, 'assessments.read');
	const { workshopId } = person;
	const rows = await AssessmentOutlook.findAll({ where: { assessmentId: assessmentIds, workshopId } });
	return new Map(rows.map(({ assessmentId, outlook }) => [assessmentId, outlook]));
}

/** What is kept, or null while it is worked out: begins the work, and does not wait for it. */
export async function peekOutlook(
	person: SignedInPerson,
	assessmentId: number,
	sayTrouble: (error: unknown) => void
): Promise<Outlook | null> {
	allow(person, 'assessments.read');
	const assessment = await findOwn(person, assessmentId);
	const kept = await findOutlook(assessment.id);
	if (!kept && !running.has(assessment.id)) begin(assessment, usualEffort()).done.catch(sayTrouble);
	return kept;
}

/** Follows the work on an outlook to its end, beginning it when nobody has. */
export async function followOutlook(
	person: SignedInPerson,
	assessmentId: number,
	tell: (progress: OutlookProgress) => void
): Promise<void> {
	allow(person, 'assessments.read');
	const assessment = await findOwn(person, assessmentId);
	if (await findOutlook(assessment.id)) return;
	const work = running.get(assessment.id) ?? begin(assessment, usualEffort());
	tell(work.progress);
	work.listeners.add(tell);
	try {
		await work.done;
	} finally {
		work.listeners.delete(tell);
	}
}
