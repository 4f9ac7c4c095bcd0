import type { Mismatch } from '$lib/schemas/fitting';
import { Assessment, Installation, Recommendation } from '../db/models';
import { listAgreed } from '../presenters/fittings';

const batteryOf = (items: Installation['agreed']): string =>
	items.find(({ key }) => key === 'battery')?.agreed ?? '';

/** What is to do next where another battery was fitted: assess it, recommend that, and hold the fitting against it. */
async function findMismatch({
	mountId,
	agreed,
	differences,
	recommendationId
}: Installation): Promise<Mismatch | null> {
	if (!differences.some(({ key }) => key === 'battery')) return null;
	const newest = await Assessment.findOne({ where: { mountId }, order: [['id', 'DESC']] });
	// To run the agreed battery once more answers nothing.
	if (!newest || batteryOf(listAgreed(newest)) === batteryOf(agreed)) return 'assess';
	const recommended = await Recommendation.findOne({
		where: { assessmentId: newest.id },
		order: [['id', 'DESC']]
	});
	return recommended && recommended.id > (recommendationId ?? 0) ? 'hold' : 'recommend';
}

/** The same of several, by mount. */
export async function findMismatches(
	installations: readonly Installation[]
): Promise<ReadonlyMap<number, Mismatch>> {
	const mismatches = new Map<number, Mismatch>();
	for (const installation of installations) {
		const mismatch = await findMismatch(installation);
		if (mismatch) mismatches.set(installation.mountId, mismatch);
	}
	return mismatches;
}
