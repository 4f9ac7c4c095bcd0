import { describe, expect, it } from 'vitest';
import {
	BRIEF_EVENINGS,
	EVENINGS,
	FITTED_INSTEAD,
	makeAgreedFor110
} from '../../../../tests/support/otherwise';
import { FITTED } from '../../../../tests/support/fitted';
import { readReview } from '../../../../tests/support/review';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { connection } from '../db/connection';
import { AuditEntry, FieldNote, FieldNoteFinding, Installation, Vehicle, Job } from '../db/models';
import { presentNote } from '../presenters/field-reports';
import { assessJob } from './assessments';
import { LIGHT_LEARNING } from './field-findings';
import { keepFieldNote, listFieldNotes, weighFieldNote } from './field-notes';
import { strikeFieldNote } from './field-strikes';
import { holdFitting } from './fitting-agreement';
import { getFitting, listFitted, saveFitting } from './fittings';
import { listMyVehicles } from './my-vehicles';
import { getMountPaper } from './papers';
import { getRecommendation } from './recommendations';
import { rebuildReview } from './review/keep-review';

useTestDatabase();

const LONG_MS = 120_000;
type Made = Awaited<ReturnType<typeof makeAgreedFor110>>;

const hold = async ({ installer, mountId }: Made, recommendationId: number) => {
	const { version } = (await getFitting(installer, mountId)).installation!;
	return holdFitting(installer, mountId, { recommendationId, version }, LIGHT_LEARNING);
};
const reportsOf = async ({ installer, mountId }: Made) =>
	(await listFieldNotes(installer, mountId)).rows.map(presentNote);
/** All that the customer reads of what happened, and of what was learnt. */
async function readMine({ crew, jobId }: Made): Promise<string> {
	const { vehicleId } = (await Job.findByPk(jobId))!;
	await Vehicle.update({ customerId: crew.customer.customerId! }, { where: { id: vehicleId } });
	const [vehicle] = await listMyVehicles(crew.customer);
	return [
		...vehicle!.history.map(({ words }) => words),
		...vehicle!.lessons.map(({ sentence }) => sentence)
	].join('\n');
}
const readPaper = async ({ installer, mountId }: Made, name: 'handover' | 'warranty-file') =>
	JSON.stringify(await getMountPaper(installer, mountId, name)).replace(/\u202F/g, ' ');

describe('a fitting of another battery than agreed', () => {
	it(
		'is judged, papered and explained as nothing that it is not, until it is held against what was fitted',
		{ timeout: LONG_MS },
		async () => {
			const made = await makeAgreedFor110();
			for (const evening of EVENINGS) await made.note(evening);
			const { installer, mountId, jobId } = made;
			expect(await listFitted(installer, jobId)).toMatchObject([{ mismatch: 'assess' }]);

			const [unjudged] = await reportsOf(made);
			expect(unjudged!.cause).toMatchObject({ word: 'It cannot be judged yet', others: [], doubt: '' });
			expect(unjudged!.cause!.sentence).toMatch(
				/goes dark at 110\s°C.*was not fitted \(battery: Fenmoor Low 65\)/
			);
			const mine = await readMine(made);
			expect(mine).toContain('cannot be judged yet');
			expect(mine).not.toMatch(/hardly|Heat alone/);
			const handover = await readPaper(made, 'handover');
			expect(handover).toContain(`"Battery, fitted instead","value":"${FITTED_INSTEAD}"`);
			expect(handover).toContain('Serial number of the fitted battery');
			expect(handover).toContain('are of the battery that was agreed, which is not the one that was fitted');
			expect(handover).toContain(
				'"sentences":["This was worked out for what was agreed, and not for what was fitted'
			);
			const warranty = await readPaper(made, 'warranty-file');
			expect(warranty).toContain('Was it heat? It cannot be judged yet.');
			expect(warranty).toContain('"Battery, fitted instead"');
			// What cannot be judged is not taken off what was reported.
			expect((await readReview(installer.workshopId)).rows).toMatchObject([
				{ dark_days: 2, not_heat_days: 0 }
			]);

			await assessJob(installer, jobId);
			expect(await listFitted(installer, jobId)).toMatchObject([{ mismatch: 'assess' }]);
			await made.chooseFitted();
			await assessJob(installer, jobId);
			expect(await listFitted(installer, jobId)).toMatchObject([{ mismatch: 'recommend' }]);
			const newer = await made.recommend();
			expect(await listFitted(installer, jobId)).toMatchObject([{ mismatch: 'hold' }]);
			const offered = await getFitting(installer, mountId);
			expect(offered.recommendation.id).toBe(made.agreed.id);
			expect(offered.newer).toEqual({ id: newer.id, number: 2, recommendedAt: newer.createdAt });
			const held = await hold(made, newer.id);
			expect(held).toMatchObject({ assessmentId: newer.assessment.id, newer: null });
			expect(held.installation!.differences).toEqual([]);
			expect(await listFitted(installer, jobId)).toMatchObject([{ mismatch: null }]);

			const reports = await reportsOf(made);
			expect(reports.map(({ cause }) => cause!.word)).toEqual(['Yes', 'Yes']);
			expect(reports[0]!.anew).toContain('The answer then was: hardly.');
			expect(await readMine(made)).toContain('Heat alone explains it. This was worked out anew');
			const after = await readPaper(made, 'handover');
			expect(handover).toMatch(/110\s°C/);
			expect(after).toMatch(/Fenmoor Low 65, 100.*65\s°C/);
			expect(after).not.toMatch(/fitted instead|110\s°C|not for what was fitted/);
			expect(await readPaper(made, 'warranty-file')).toContain(`Recommendation ${newer.number}`);
			expect(await getRecommendation(installer, newer.id)).toMatchObject({ isFittedUnder: true });
			const kept = await readReview(installer.workshopId);
			expect(kept.rows).toMatchObject([{ recommendation_id: newer.id, dark_days: 2, not_heat_days: 0 }]);
			await rebuildReview(installer.workshopId);
			expect(await readReview(installer.workshopId)).toEqual(kept);
		}
	);

	it(
		'goes back to the earlier recommendation as it was, with what its notes had come to still on record',
		{ timeout: LONG_MS },
		async () => {
			const made = await makeAgreedFor110();
			await made.note(EVENINGS[0]);
			const before = await getFitting(made.installer, made.mountId);
			const asNoted = (await FieldNote.findAll({ where: {}, order: [['id', 'DESC']], limit: 1 }))[0]!;
			await made.chooseFitted();
			const newer = await made.recommend();
			await hold(made, newer.id);
			await hold(made, made.agreed.id);
			const back = await getFitting(made.installer, made.mountId);
			expect(back.installation!.differences).toEqual(before.installation!.differences);
			expect(back).toMatchObject({ agreed: before.agreed, assessmentId: before.assessmentId });
			const [row] = (await listFieldNotes(made.installer, made.mountId)).rows;
			expect(row!.finding).toEqual(asNoted.finding);
			expect((await FieldNote.findByPk(asNoted.id))!.finding).toEqual(asNoted.finding);
			const found = await FieldNoteFinding.findAll({
				where: { fieldNoteId: asNoted.id },
				order: [['id', 'ASC']]
			});
			expect(found.map(({ assessmentId }) => assessmentId)).toEqual([
				newer.assessment.id,
				before.assessmentId
			]);
			for (const sql of ['UPDATE field_note_findings SET id = id + 0', 'DELETE FROM field_note_findings'])
				await expect(connection().query(sql)).rejects.toThrow('immutable');
			const where = { action: 'mount.fitting-held', subjectId: made.mountId };
			const audited = await AuditEntry.findAll({ where, order: [['id', 'ASC']] });
			expect(audited.map(({ detail }) => detail)).toMatchObject([
				{ before: made.agreed.id, recommendationId: newer.id },
				{ before: newer.id, recommendationId: made.agreed.id }
			]);
		}
	);

	it(
		'named in other words stays a difference, which is for whoever noted it',
		{ timeout: LONG_MS },
		async () => {
			const made = await makeAgreedFor110('The low one of Fenmoor');
			await made.chooseFitted();
			const newer = await made.recommend();
			const { installation } = await hold(made, newer.id);
			expect(installation!.differences).toEqual([{ key: 'battery', fitted: 'The low one of Fenmoor' }]);
			expect(await readPaper(made, 'handover')).toContain('fitted instead');
			const { version } = installation!;
			await saveFitting(made.installer, made.mountId, { ...FITTED, version });
			expect(await readPaper(made, 'handover')).not.toContain('fitted instead');
		}
	);
});

describe('holding a fitting against another recommendation', () => {
	it('is refused for a version of before, another mount’s recommendation, and other people', async () => {
		const made = await makeAgreedFor110();
		const newer = await made.recommend();
		const { mountId, installer, crew } = made;
		const { version } = (await getFitting(installer, mountId)).installation!;
		const attempt = (who: typeof installer, recommendationId: number, seen = version) =>
			holdFitting(who, mountId, { recommendationId, version: seen }, LIGHT_LEARNING);
		await expect(attempt(installer, newer.id, version + 1)).rejects.toMatchObject({
			code: 'changed_meanwhile'
		});
		const other = await makeAgreedFor110();
		await expect(attempt(installer, other.agreed.id)).rejects.toMatchObject({
			problems: [{ path: 'recommendationId' }]
		});
		await expect(attempt(crew.customer, newer.id)).rejects.toMatchObject({ code: 'not_allowed' });
		const { installer: neighbour } = await makeCrew();
		await expect(attempt(neighbour, newer.id)).rejects.toMatchObject({ code: 'not_found' });
		const both = await Promise.allSettled([attempt(installer, newer.id), attempt(installer, newer.id)]);
		expect(both.map(({ status }) => status)).toContain('fulfilled');
		const where = { action: 'mount.fitting-held', subjectId: mountId };
		expect(await AuditEntry.count({ where })).toBe(1);
		// To press it once more changes nothing.
		expect((await attempt(installer, newer.id)).recommendation.id).toBe(newer.id);
		expect(await AuditEntry.count({ where })).toBe(1);
	});

	it('lets no note in that was weighed by the earlier one meanwhile', { timeout: LONG_MS }, async () => {
		const made = await makeAgreedFor110();
		const { installer, mountId } = made;
		await made.chooseFitted();
		const newer = await made.recommend();
		const weighed = await weighFieldNote(installer, mountId, EVENINGS[0], LIGHT_LEARNING);
		await hold(made, newer.id);
		await expect(keepFieldNote(installer, mountId, weighed)).rejects.toMatchObject({ code: 'conflict' });
		expect((await Installation.findOne({ where: { mountId } }))!.recommendationId).toBe(newer.id);
	});
});

describe('evenings that contradict the estimate', () => {
	it(
		'raise doubt of it from the second on, before other causes, and not once one is struck out',
		{ timeout: LONG_MS },
		async () => {
			const made = await makeAgreedFor110('');
			await made.note(BRIEF_EVENINGS[0]!);
			const [alone] = await reportsOf(made);
			expect(alone!.cause).toMatchObject({ word: 'Hardly', doubt: '' });
			await made.note(BRIEF_EVENINGS[1]!);
			const both = await reportsOf(made);
			for (const { cause } of both)
				expect(cause!.doubt).toMatch(
					/^2 times .*may be wrong for this mount\. Before any other cause: check what was fitted/
				);
			expect(await readPaper(made, 'warranty-file')).toContain('may be wrong for this mount');
			expect(await readMine(made)).toContain('the estimate may be wrong: the shop measures first');
			await strikeFieldNote(made.installer, made.mountId, both[0]!.id, { reason: 'Of another vehicle' });
			expect((await reportsOf(made)).map(({ cause }) => cause?.doubt ?? null)).toEqual([null, '']);
		}
	);
});
