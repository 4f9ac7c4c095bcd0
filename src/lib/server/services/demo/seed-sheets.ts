import type { Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import { LIGHT_EFFORT } from '$lib/thermal/outlook';
import { Assessment, OutgoingMail, Recommendation } from '../../db/models';
import { ensureOutlook } from '../outlooks';
import { acknowledgeSheet, openSheet } from '../sheet-readers';
import { sendSheet } from '../sheets';

interface Posted {
	recommendationId: number;
	name: string;
	email: string;
	acknowledged: boolean;
}

/** Sends the sheet to an invented customer, who opens the link in the letter and acknowledges, or has not yet. */
export async function seedSheet(
	person: SignedInPerson,
	{ recommendationId, name, email, acknowledged }: Posted,
	transaction: Transaction
): Promise<void> {
	const recommendation = await Recommendation.findByPk(recommendationId, { transaction });
	const assessment = await Assessment.findByPk(recommendation!.assessmentId, { transaction });
	await ensureOutlook(assessment!, LIGHT_EFFORT);
	const { sheet } = await sendSheet(person, { recommendationId, sendTo: email });
	if (!acknowledged) return;
	const letter = await OutgoingMail.findOne({ where: { sheetId: sheet.id }, transaction });
	const token = /\/sheet\/([\w-]+)/.exec(letter?.textBody ?? '')?.[1] ?? '';
	const { contentSha256 } = await openSheet(token);
	await acknowledgeSheet(token, { name, understood: true, contentSha256 });
}
