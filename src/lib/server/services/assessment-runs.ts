import type { Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import { ENGINE_VERSION } from '$lib/thermal';
import { Assessment, type Job, type Mount } from '../db/models';
import { caseOf, findJobParts, gatherInputs, type JobParts } from './assessment-inputs';
import { recordBy } from './audit';
import { bookInForce } from './books';
import { updateJobOutcome } from './job-outcome';
import { columnsOf, hashInputs, runInputs } from './run-inputs';

/** The newest assessment of the mount, when the very same inputs and engine made it: a repeat would add nothing. */
async function findSame(mountId: number, inputsSha256: string): Promise<Assessment | null> {
	const newest = await Assessment.findOne({ where: { mountId }, order: [['id', 'DESC']] });
	const isSame = newest?.inputsSha256 === inputsSha256 && newest.engineVersion === ENGINE_VERSION;
	return isSame ? newest : null;
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
