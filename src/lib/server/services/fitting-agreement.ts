import type { Transaction } from 'sequelize';
import { compareAnew } from '$lib/format/agreed-anew';
import type { AgreementChange, FittingView } from '$lib/schemas/fitting';
import type { SignedInPerson } from '$lib/schemas/people';
import { ENGINE_VERSION } from '$lib/thermal';
import { Assessment, FieldNoteFinding, Installation, type Mount, type Recommendation } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, changedMeanwhile } from '../errors';
import { allow } from '../policies';
import { listAgreed } from '../presenters/fittings';
import { settleLabels } from './accuracy/label-checks';
import { recordBy } from './audit';
import { findAllAnew, FULL_LEARNING, type FoundAnew } from './field-findings';
import { getFitting } from './fittings';
import { isSameKnown, knownOf, readNoted } from './judged-notes';
import { findStandingMount } from './mounts';
import { listOfMount } from './recommendation-history';
import { notThere, saveVersioned } from './records';
import { refreshReview } from './review/keep-review';

async function findRecommendation(mount: Mount, id: number): Promise<Recommendation> {
	const found = (await listOfMount(mount)).find((each) => each.id === id);
	if (!found) throw notThere('recommendation', 'recommendationId');
	return found;
}

async function findInstallation(mountId: number): Promise<Installation> {
	const installation = await Installation.findOne({ where: { mountId } });
	if (!installation)
		throw new AppError('conflict', 'This mount has not been fitted yet: say first what was.');
	return installation;
}

/** What its notes come to by another assessment; by the same one they stay as they are. */
async function weighAnew(installation: Installation, assessment: Assessment, effort = FULL_LEARNING) {
	const noted = await readNoted([installation]);
	const isOther = assessment.id !== installation.assessmentId;
	const found = isOther ? await findAllAnew(assessment, noted, { ...effort, seed: installation.id }) : [];
	return { found, known: knownOf(installation, noted) };
}

async function keepFindings(
	found: readonly FoundAnew[],
	{ id: assessmentId, workshopId }: Assessment,
	transaction: Transaction
): Promise<void> {
	const about = { workshopId, assessmentId, engineVersion: ENGINE_VERSION };
	const rows = found.map(({ noteId: fieldNoteId, finding }) => ({ ...about, fieldNoteId, finding }));
	await FieldNoteFinding.bulkCreate(rows, { transaction });
}

const NOTED_MEANWHILE =
	'Somebody noted something of this battery meanwhile, or struck it out, which counts here: press it again.';

/**
 * Holds what was fitted against another recommendation of its mount. What is otherwise is compared anew, and everything
 * that rests on the agreement follows; what the notes came to before stays with them. Works the notes out first, which
 * takes seconds each, and changes nothing until then.
 */
export async function holdFitting(
	person: SignedInPerson,
	mountId: number,
	{ recommendationId, version }: AgreementChange,
	effort = FULL_LEARNING
): Promise<FittingView> {
	allow(person, 'mounts.write');
	const mount = await findStandingMount(person, mountId);
	const recommendation = await findRecommendation(mount, recommendationId);
	const seen = await findInstallation(mountId);
	if (seen.recommendationId === recommendationId) return getFitting(person, mountId);
	if (seen.version !== version) throw changedMeanwhile('fitting');
	const assessment = (await Assessment.findByPk(recommendation.assessmentId))!;
	const { found, known } = await weighAnew(seen, assessment, effort);
	return inTransaction(async (transaction) => {
		const lock = transaction.LOCK.UPDATE;
		const installation = (await Installation.findByPk(seen.id, { transaction, lock }))!;
		if (!isSameKnown(knownOf(installation, await readNoted([installation])), known))
			throw new AppError('conflict', NOTED_MEANWHILE);
		const agreed = listAgreed(assessment);
		const differences = compareAnew(installation.agreed, agreed, installation.differences);
		const held = { assessmentId: assessment.id, recommendationId, agreed, differences };
		const before = installation.recommendationId;
		await saveVersioned(installation, 'fitting', version, held, transaction);
		await keepFindings(found, assessment, transaction);
		await settleLabels(installation.id, transaction);
		await refreshReview('installation', installation.id, transaction);
		const detail = { before, recommendationId, assessmentId: assessment.id, differences };
		await recordBy(person, 'mount.fitting-held', { type: 'mount', id: mountId }, transaction, detail);
		return getFitting(person, mountId);
	});
}
