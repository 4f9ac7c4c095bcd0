import { Op, type Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import { Assessment, Mount, Recommendation, Workshop } from '../db/models';
import { AppError, notFound } from '../errors';
import type { SheetSource } from '../presenters/sheet-content';

async function findNewest(person: SignedInPerson, recommendationId: number): Promise<Recommendation> {
	const where = { id: recommendationId, workshopId: person.workshopId };
	const recommendation = await Recommendation.findOne({ where });
	if (!recommendation) throw notFound('recommendation');
	const newer = await Recommendation.count({
		where: { jobId: recommendation.jobId, id: { [Op.gt]: recommendation.id } }
	});
	if (newer > 0)
		throw new AppError('conflict', 'There is a newer recommendation for this job: send that one.', [
			{ path: 'recommendationId', message: 'There is a newer recommendation for this job: send that one.' }
		]);
	return recommendation;
}

/** The newest answer for each position of the job that still stands, except the recommended one. */
async function findOthers(chosen: Assessment, transaction: Transaction): Promise<SheetSource['others']> {
	const { jobId, mountId, workshopId } = chosen;
	const where = { jobId, workshopId };
	const rows = await Assessment.findAll({
		where: { ...where, mountId: { [Op.ne]: mountId } },
		attributes: ['id', 'mountId'],
		order: [['id', 'ASC']],
		transaction
	});
	const newestOf = new Map(rows.map((row) => [row.mountId, row.id]));
	const standing = await Mount.findAll({
		where: { ...where, id: [...newestOf.keys()], removedAt: null },
		order: [['letter', 'ASC']],
		transaction
	});
	const newest = await Assessment.findAll({
		where: { ...where, id: standing.map((mount) => newestOf.get(mount.id) ?? 0) },
		transaction
	});
	return standing.flatMap((mount) => {
		const assessment = newest.find((each) => each.mountId === mount.id);
		return assessment ? [{ mountName: mount.name, result: assessment.result }] : [];
	});
}

/** Collects everything that a sheet says, as it stands at this moment. */
export async function readSheetSource(
	person: SignedInPerson,
	recommendationId: number,
	transaction: Transaction
): Promise<SheetSource & { jobId: number }> {
	const { workshopId } = person;
	const recommendation = await findNewest(person, recommendationId);
	const { jobId, assessmentId, againstVerdict, decidedBy, reason } = recommendation;
	const assessment = await Assessment.findOne({ where: { id: assessmentId, workshopId }, transaction });
	const workshop = await Workshop.findByPk(workshopId, { transaction });
	if (!assessment || !workshop) throw notFound('recommendation');
	const { name, address, phone, email } = workshop;
	return {
		workshop: { name, address, phone, email },
		...{ jobId, assessmentId },
		preparedBy: person.name,
		preparedAt: new Date(),
		inputs: assessment.inputs,
		result: assessment.result,
		override: againstVerdict ? { decidedBy: decidedBy ?? '', reason: reason ?? '' } : null,
		others: await findOthers(assessment, transaction)
	};
}
