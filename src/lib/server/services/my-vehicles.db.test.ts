import { describe, expect, it } from 'vitest';
import { readPdf } from '../../../../tests/support/documents';
import { FITTED } from '../../../../tests/support/fitted';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { makeSentSheet } from '../../../../tests/support/sheets';
import { Vehicle, Job } from '../db/models';
import { addFieldNote } from './field-notes';
import { finishFollowUp, saveFitting } from './fittings';
import { listMyVehicles } from './my-vehicles';
import { writeMyHandover, writeMyRecommendation } from './papers';
import { answerQuestion, askByLink } from './questions';
import { acknowledgeSheet, openSheet } from './sheet-readers';

useTestDatabase();

/** Without the narrow spaces before units. */
const plain = (text: string): string => text.replace(/\u202F/g, ' ');

/** A customer whose battery was sent about, acknowledged, asked about, fitted, looked at and read. */
async function makeStory() {
	const made = await makeSentSheet();
	const { crew, jobId, token, assessment } = made;
	const job = (await Job.findByPk(jobId))!;
	await Vehicle.update({ customerId: crew.customer.customerId! }, { where: { id: job.vehicleId } });
	const { contentSha256 } = await openSheet(token);
	await acknowledgeSheet(token, { name: 'Ilse Tarn', understood: true, contentSha256 });
	const [question] = await askByLink(token, { askedBy: 'Ilse Tarn', question: 'Why there?' }, null);
	await answerQuestion(crew.installer, question!.id, 'For the short cable.');
	const fitting = await saveFitting(crew.installer, assessment.mountId, FITTED);
	const [first] = fitting.followUps;
	await finishFollowUp(crew.installer, first!.id, { isDone: true, version: first!.version });
	const label = {
		kind: 'peak-label',
		place: 'case',
		turnedC: 77,
		notTurnedC: null,
		hottestDayC: 42
	} as const;
	await addFieldNote(crew.installer, assessment.mountId, { ...label, notedOn: '2026-02-20' });
	return made;
}

describe('what a customer finds of their own vehicles', () => {
	it('is each vehicle with its documents, what happened in plain words, and what was learnt', async () => {
		const { crew, sheet, token, assessment } = await makeStory();
		const [vehicle, ...more] = await listMyVehicles(crew.customer);
		expect(more).toEqual([]);
		expect(vehicle!.documents).toMatchObject([
			{ href: `/my/${sheet.id}` },
			{ href: `/my/recommendation/${sheet.recommendationId}.pdf` },
			{ href: `/my/handover/${assessment.mountId}.pdf` }
		]);
		const { text } = await readPdf(await writeMyHandover(crew.customer, assessment.mountId));
		expect(text).toContain('Handover');
		const recommended = await readPdf(await writeMyRecommendation(crew.customer, sheet.recommendationId));
		expect(recommended.text).toContain('Recommendation 1, job');
		const { customer } = await makeCrew();
		const stranger = { ...customer, workshopId: crew.workshopId };
		for (const read of [
			() => writeMyHandover(stranger, assessment.mountId),
			() => writeMyRecommendation(stranger, sheet.recommendationId)
		]) {
			await expect(read()).rejects.toMatchObject({ code: 'not_found' });
		}
		const titles = vehicle!.history.map(({ title }) => title);
		expect([...titles].sort()).toEqual([
			...['Battery fitted', 'Battery looked at', 'Heat label read', 'Page acknowledged', 'Page opened'],
			...['Page sent', 'Question answered', 'Question asked']
		]);
		const moments = vehicle!.history.map(({ at }) => at);
		expect(moments).toEqual([...moments].sort().reverse());
		expect(vehicle!.due).toEqual([
			'31 July 2026, the look after 6 months',
			'31 January 2027, the look after 12 months'
		]);
		const told = plain(vehicle!.history.map(({ words }) => words).join(' '));
		expect(told).toContain('Its field for 77 °C has turned.');
		expect(told).not.toMatch(/\bBMS\b|headroom|\bseed\b|verdict/i);
		const [lesson] = vehicle!.lessons;
		expect(plain(lesson!.read)).toContain('has turned at 77 °C');
		expect(lesson!.sentence).toMatch(/estimate/);
		for (const { before, after } of lesson!.figures ?? []) expect([before, after].join()).toMatch(/\d|all/);
		// What the reading taught stands on the page itself too, for whoever holds the link.
		expect((await openSheet(token)).lessons).toEqual([lesson]);
	}, 60_000);

	it('is nothing of another customer, and not for the shop', async () => {
		const { crew } = await makeSentSheet();
		const { customer: stranger } = await makeCrew();
		expect(await listMyVehicles({ ...stranger, workshopId: crew.workshopId })).toEqual([]);
		await expect(listMyVehicles(crew.manager)).rejects.toMatchObject({ code: 'not_allowed' });
	});
});
