import { UniqueConstraintError } from 'sequelize';
import { sayRegion } from '$lib/format/caution-regions';
import { listCautions } from '$lib/format/cautions';
import type { CautionLine, CautionTextInput, CautionTextView } from '$lib/schemas/caution-texts';
import type { SignedInPerson } from '$lib/schemas/people';
import { CautionText, Person } from '../db/models';
import { inTransaction } from '../db/transaction';
import { changedMeanwhile } from '../errors';
import { allow } from '../policies';
import { recordBy } from './audit';

const newest = (workshopId: number): Promise<CautionText | null> =>
	CautionText.findOne({ where: { workshopId }, order: [['number', 'DESC']] });

async function show(row: CautionText | null): Promise<CautionTextView> {
	if (!row) return { number: 0, region: 'elsewhere', sentences: [], changedBy: '', changedAt: null };
	const author = await Person.findByPk(row.createdBy);
	const { number, region, sentences, createdAt } = row;
	return { number, region, sentences, changedBy: author?.name ?? '', changedAt: createdAt.toISOString() };
}

/** What the workshop adds to the cautions now. */
export async function getCautionText(person: SignedInPerson): Promise<CautionTextView> {
	allow(person, 'shop.write');
	return show(await newest(person.workshopId));
}

/** Keeps what the workshop adds from now on. What was issued before keeps the text that it was issued with. */
export async function saveCautionText(
	person: SignedInPerson,
	{ number: seen, ...text }: CautionTextInput
): Promise<CautionTextView> {
	const { workshopId } = allow(person, 'shop.write');
	try {
		return await inTransaction(async (transaction) => {
			const before = await newest(workshopId);
			if ((before?.number ?? 0) !== seen) throw changedMeanwhile('text');
			const row = { workshopId, number: seen + 1, ...text, createdBy: person.id };
			const made = await CautionText.create(row, { transaction });
			const subject = { type: 'workshop', id: workshopId };
			await recordBy(person, 'shop.cautions-changed', subject, transaction, { number: made.number, ...text });
			return show(made);
		});
	} catch (error) {
		if (error instanceof UniqueConstraintError) throw changedMeanwhile('text');
		throw error;
	}
}

/** Every caution that is issued with a battery of this chemistry: ours, always all of them, then region and shop. */
export async function listIssuedCautions(
	workshopId: number,
	workshopName: string,
	chemistry: string
): Promise<CautionLine[]> {
	const ours = listCautions(chemistry).map(({ title, text }) => ({ title, text }));
	const added = await newest(workshopId);
	if (!added) return ours;
	const own = added.sentences.join(' ');
	return [
		...ours,
		sayRegion(added.region),
		...(own === '' ? [] : [{ title: `From ${workshopName}`, text: own }])
	];
}
