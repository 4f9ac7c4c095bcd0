import type { Transaction } from 'sequelize';
import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import type { SignedInPerson } from '$lib/schemas/people';
import { ENGINE_VERSION } from '$lib/thermal';
import { assessScenario } from '$lib/thermal/assess';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import { Assessment, type Job, type Mount } from '../db/models';
import { AppError } from '../errors';
import { canonicalJson, sha256 } from '../hash';
import { caseOf, findJobParts, gatherInputs, type JobParts } from './assessment-inputs';
import { recordBy } from './audit';
import { bookInForce } from './books';
import { updateJobOutcome } from './job-outcome';
import { asInputError } from './simulations';

/** Runs what went in; a run that cannot be finished is an error, so that nothing of it is stored. */
export function runInputs({ scenario, dayPlan, battery }: AssessmentInputs): AssessmentResult {
	try {
		const answer = assessScenario(scenario, {
			legKinds: dayPlan.legs.map(({ kind }) => kind),
			heatLimits: heatLimitsOf(battery)
		});
		if (answer.status === 'done') return answer;
		throw new AppError(
			'simulation_failed',
			`The run could not be finished, and nothing was stored. ${answer.reason}`
		);
	} catch (error) {
		throw asInputError(error);
	}
}

export const hashInputs = (inputs: AssessmentInputs): string => sha256(canonicalJson(inputs));

/** The newest assessment of the mount, when the very same inputs and engine made it: a repeat would add nothing. */
async function findSame(mountId: number, inputsSha256: string): Promise<Assessment | null> {
	const newest = await Assessment.findOne({ where: { mountId }, order: [['id', 'DESC']] });
	const isSame = newest?.inputsSha256 === inputsSha256 && newest.engineVersion === ENGINE_VERSION;
	return isSame ? newest : null;
}

/** What lists filter and sort by stands in columns of its own. */
function columnsOf(result: AssessmentResult) {
	const { verdict, headroomK, peakCellsC, peakAtHour, cutAtHour, resetAtHour } = result;
	const { darkHours, chargeMissedAh, engineVersion } = result;
	return {
		...{ verdict, headroomK, peakCellsC, peakAtHour, cutAtHour, resetAtHour },
		...{ darkHours, chargeMissedAh, engineVersion }
	};
}

async function assessOne(
	person: SignedInPerson,
	parts: JobParts,
	mount: Mount,
	transaction: Transaction
): Promise<Assessment> {
	const book = await bookInForce(person, caseOf(parts, mount));
	const inputs = gatherInputs(parts, mount, book);
	const inputsSha256 = hashInputs(inputs);
	const same = await findSame(mount.id, inputsSha256);
	if (same) return same;
	const result = runInputs(inputs);
	const assessment = await Assessment.create(
		{
			workshopId: person.workshopId,
			jobId: parts.job.id,
			mountId: mount.id,
			bookId: book.id,
			...columnsOf(result),
			chemistry: inputs.battery.chemistry,
			...{ inputs, inputsSha256, result },
			createdBy: person.id
		},
		{ transaction }
	);
	const { verdict, headroomK } = result;
	const detail = { jobId: parts.job.id, mountId: mount.id, verdict, headroomK, inputsSha256 };
	await recordBy(person, 'assessment.made', { type: 'assessment', id: assessment.id }, transaction, detail);
	return assessment;
}

/** Assesses mounts of one job, whose row the caller has locked, and lets the job say what came out. */
export async function assessMounts(
	person: SignedInPerson,
	job: Job,
	mounts: Mount[],
	transaction: Transaction
): Promise<Assessment[]> {
	const parts = await findJobParts(job);
	const made: Assessment[] = [];
	for (const mount of mounts) made.push(await assessOne(person, parts, mount, transaction));
	await updateJobOutcome(job, transaction);
	return made;
}
