import { randomUUID } from 'node:crypto';
import { Assessment, Customer, Job, Mount, Person, Vehicle } from '../../src/lib/server/db/models';
import { inTransaction } from '../../src/lib/server/db/transaction';
import { LIGHT_EFFORT } from './sheets';
import { assessJob } from '../../src/lib/server/services/assessments';
import { updateCustomer } from '../../src/lib/server/services/customers';
import { addFieldNote } from '../../src/lib/server/services/field-notes';
import { strikeFieldNote } from '../../src/lib/server/services/field-strikes';
import { saveFitting } from '../../src/lib/server/services/fittings';
import { ensureOutlook } from '../../src/lib/server/services/outlooks';
import { answerQuestion, askByLink } from '../../src/lib/server/services/questions';
import { makeRecommendation } from '../../src/lib/server/services/recommendations';
import { acknowledgeSheet, openSheet } from '../../src/lib/server/services/sheet-readers';
import { sendSheet } from '../../src/lib/server/services/sheets';
import { FITTED } from './fitted';
import { makeRecommendedJob, readToken } from './sheets';

/** A customer known by words that nobody else in the database has, which stand in every place where people write. */
export async function makeKnownCustomer() {
	const tag = randomUUID().slice(0, 8);
	const surname = `Marlow${tag}`;
	const known = {
		surname,
		name: `Zita ${surname}`,
		email: `zita.${tag}@travellers.example`,
		phone: `+61 8 ${tag}`,
		registration: `REG${tag}`,
		question: `Will it bear the heat of ${tag}?`
	};
	const { name, email, phone, registration } = known;
	const { crew, jobId, assessment } = await makeRecommendedJob('hot', async ({ installer, customer }) => {
		const { version } = (await Customer.findByPk(customer.customerId!))!;
		await updateCustomer(installer, customer.customerId!, { name, email, phone, version });
		await Person.update({ name, email }, { where: { id: customer.id } });
	});
	const customer = { ...crew.customer, name, email };
	const { vehicleId } = (await Job.findByPk(jobId))!;
	await Vehicle.update({ registration, customerId: customer.customerId! }, { where: { id: vehicleId } });
	await Job.update({ note: `${name} calls in the evening.` }, { where: { id: jobId } });
	await Mount.update({ name: `Corner of ${name}` }, { where: { id: assessment.mountId } });
	const again = await assessJob(crew.installer, jobId);
	const chosen = again.find(({ mountId }) => mountId === assessment.mountId)!;
	await ensureOutlook((await Assessment.findByPk(chosen.id))!, LIGHT_EFFORT);
	const why = { decidedBy: name, reason: `Ms ${surname} wants it there.` };
	const { id: recommendationId } = await makeRecommendation(crew.installer, {
		assessmentId: chosen.id,
		...why
	});
	const { sheet } = await sendSheet(crew.installer, { recommendationId, sendTo: email });
	const token = await readToken(sheet.id);
	const { contentSha256 } = await openSheet(token);
	await acknowledgeSheet(token, { name, understood: true, contentSha256 });
	const [question] = await askByLink(token, { askedBy: name, question: known.question }, null);
	await answerQuestion(crew.installer, question!.id, `Dear Zita, yes: ${known.question}`);
	await saveFitting(crew.installer, assessment.mountId, { ...FITTED, note: `${name} was there.` });
	const words = `Ms ${surname} says that it smells of nothing.`;
	const inspection = { kind: 'inspection', notedOn: '2026-02-10', words } as const;
	const { rows } = await addFieldNote(crew.installer, assessment.mountId, inspection);
	await strikeFieldNote(crew.installer, assessment.mountId, rows[0]!.id, {
		reason: `Ms ${surname} said so of another battery.`
	});
	return { known, crew, customer, jobId, sheet, token, assessmentId: chosen.id };
}

/** Runs what must be undone again. */
export async function andUndo(work: () => Promise<void>): Promise<void> {
	const UNDO = 'undone on purpose';
	await inTransaction(async () => {
		await work();
		throw new Error(UNDO);
	}).catch((error: unknown) => {
		if (!(error instanceof Error) || error.message !== UNDO) throw error;
	});
}
