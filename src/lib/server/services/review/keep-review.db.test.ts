import { describe, expect, it } from 'vitest';
import { FITTED, makeFitted } from '../../../../../tests/support/fitted';
import { PLACE } from '../../../../../tests/support/records';
import { readReview } from '../../../../../tests/support/review';
import { makeCrew, useTestDatabase } from '../../../../../tests/support/services';
import { LIGHT_EFFORT, makeSentSheet, readToken } from '../../../../../tests/support/sheets';
import { connection } from '../../db/connection';
import { reviewListQuerySchema } from '$lib/schemas/review';
import { Assessment, Recommendation } from '../../db/models';
import { addFieldNote } from '../field-notes';
import { finishFollowUp, getFitting, saveFitting } from '../fittings';
import { getJob, setJobClimate } from '../jobs';
import { removeMount, restoreMount } from '../mounts';
import { createPlace, getPlace, updatePlace } from '../places';
import { ensureOutlook } from '../outlooks';
import { makeRecommendation } from '../recommendations';
import { acknowledgeSheet, openSheet } from '../sheet-readers';
import { sendSheet, withdrawSheet } from '../sheets';
import { completeReviews, rebuildReview } from './keep-review';
import { createOwnZone, removeOwnZone, updateOwnZone } from './own-zones';
import { writeReviewCsv } from './review-csv';
import { listInstallations } from './review-list';

useTestDatabase();

const LONG_MS = 120_000;
const INSPECTION = { kind: 'inspection', notedOn: '2026-02-03', words: 'Dry and tight.' } as const;
const DARK = {
	...({ kind: 'cut-out', notedOn: '2026-02-10', hottestDayC: 25, withinHours: 0.5 } as const),
	...{ wentDarkHour: 3.5, cameBackHour: 4 }
};
const MEANS = {
	// Brisbane’s rounded public means and rain: humid, hot summers.
	monthlyMeanC: [25, 25, 23.5, 21, 18.5, 15.5, 14.5, 15.5, 18, 20.5, 22, 23.5],
	monthlyRainMm: [97.3, 142.7, 85.8, 80.9, 107.4, 51.6, 28.6, 33.6, 28.4, 60.4, 98.4, 112.8],
	classSource: 'Public monthly means'
};

describe('the review of a workshop', () => {
	it(
		'follows everything that is done to an installation, and is the same when it is made anew',
		async () => {
			const { crew, jobId, assessment, recommendationId, sheet } = await makeSentSheet();
			const { installer, manager, workshopId } = crew;
			const { mountId } = assessment;
			/** The row as it is kept, after it was held against one that is made anew. */
			const keptRow = async (): Promise<Record<string, unknown> | undefined> => {
				const kept = await readReview(workshopId);
				expect(kept.empty).toEqual([]);
				await rebuildReview(workshopId);
				expect(await readReview(workshopId)).toEqual(kept);
				return kept.rows[0];
			};

			expect(await keptRow()).toBeUndefined();
			const fitting = await saveFitting(installer, mountId, FITTED);
			expect(await keptRow()).toMatchObject({
				...{ fitted_on: '2026-01-31', verdict: 'cuts-out', chance: 'known', zone: 'BWh', own_zone_id: 0 },
				...{ next_due_on: '2026-02-28', against_verdict: 1, recommendation_id: recommendationId },
				...{ sheet_state: 'waiting', sheet_id: sheet.id, dark_days: 0 }
			});

			const version = fitting.installation!.version;
			await saveFitting(installer, mountId, { ...FITTED, fittedOn: '2026-01-15', version });
			expect(await keptRow()).toMatchObject({ fitted_on: '2026-01-15', next_due_on: '2026-02-15' });
			const [first] = (await getFitting(installer, mountId)).followUps;
			await finishFollowUp(installer, first!.id, { isDone: true, version: first!.version });
			expect(await keptRow()).toMatchObject({ next_due_on: '2026-07-15' });

			await addFieldNote(installer, mountId, INSPECTION);
			expect(await keptRow()).toMatchObject({ dark_days: 0 });
			await addFieldNote(installer, mountId, DARK);
			await addFieldNote(installer, mountId, { ...DARK, wentDarkHour: 5, cameBackHour: 5.5 });
			// Twice on one day is one dark day, and heat explains neither.
			expect(await keptRow()).toMatchObject({ dark_days: 1, not_heat_days: 1 });

			await withdrawSheet(installer, sheet.id);
			expect(await keptRow()).toMatchObject({ sheet_state: 'missing', sheet_id: null });
			const words = { decidedBy: 'Ilse Tarn', reason: 'A second look: the duct is in now.' };
			const again = await makeRecommendation(installer, { assessmentId: assessment.id, ...words });
			// It was fitted under the first, whatever is recommended afterwards.
			expect(await keptRow()).toMatchObject({ recommendation_id: recommendationId });
			const overrides = reviewListQuerySchema.parse({ list: 'overrides' });
			const { rows } = await listInstallations(manager, overrides);
			const { decidedBy, reason } = (await Recommendation.findByPk(recommendationId))!;
			expect(rows).toMatchObject([
				{
					override: { decidedBy, reason, enteredBy: installer.name },
					later: {
						...{ id: again.id, number: 2, on: again.createdAt.slice(0, 10) },
						recommendedBy: installer.name
					}
				}
			]);
			const sent = await sendSheet(installer, {
				recommendationId: again.id,
				sendTo: 'ilse@travellers.example'
			});
			expect(await keptRow()).toMatchObject({ sheet_state: 'waiting', sheet_id: sent.sheet.id });
			const token = await readToken(sent.sheet.id);
			const { contentSha256 } = await openSheet(token);
			await acknowledgeSheet(token, { name: 'Ilse Tarn', understood: true, contentSha256 });
			expect(await keptRow()).toMatchObject({ sheet_state: 'acknowledged' });

			const pieces: string[] = [];
			for await (const piece of writeReviewCsv(manager, overrides)) pieces.push(piece);
			const csv = pieces.join('').split('\r\n');
			expect(csv[0]).toContain('Went ahead by,Entered by,Reason,Recommended again on');
			expect(csv[1]).toContain(`${decidedBy},${installer.name},`);

			const place = await createPlace(installer, { ...PLACE, name: `Elsewhere ${jobId}`, climateZone: 'Aw' });
			const job = await getJob(installer, jobId);
			const climate = { placeId: place.id, ...job.hotDay!, daysOnRoad: null, version: job.version };
			await setJobClimate(installer, jobId, climate);
			expect(await keptRow()).toMatchObject({ place_id: place.id, zone: 'Aw' });
			const {
				id: _id,
				computedZone: _zone,
				weatherFile: _file,
				canPutBack: _can,
				...known
			} = await getPlace(installer, place.id);
			await updatePlace(installer, place.id, { ...known, ...MEANS });
			// The class that is computed goes before the one that somebody chose.
			expect(await keptRow()).toMatchObject({ zone: 'Cfa' });

			const latitude = { rule: 'latitude' as const, fromValue: -40, toValue: 0, placeIds: [] };
			const south = await createOwnZone(manager, { name: 'South', position: 2, ...latitude });
			expect(await keptRow()).toMatchObject({ own_zone_id: south.id });
			const list = { rule: 'places' as const, fromValue: null, toValue: null, placeIds: [place.id] };
			const chosen = await createOwnZone(manager, { name: 'Chosen', position: 1, ...list });
			expect(await keptRow()).toMatchObject({ own_zone_id: chosen.id });
			await updateOwnZone(manager, chosen.id, {
				name: 'Chosen',
				position: 3,
				...list,
				version: chosen.version
			});
			expect(await keptRow()).toMatchObject({ own_zone_id: south.id });
			await removeOwnZone(manager, south.id);
			expect(await keptRow()).toMatchObject({ own_zone_id: chosen.id });

			await removeMount(installer, mountId);
			expect(await keptRow()).toBeUndefined();
			await restoreMount(installer, mountId);
			expect(await keptRow()).toMatchObject({ zone: 'Cfa', sheet_state: 'acknowledged', dark_days: 1 });
		},
		LONG_MS
	);

	it('does not know a chance before the outlook is worked out, and takes it up when it is', async () => {
		const { installer, workshopId } = await makeCrew();
		const { assessment } = await makeFitted(installer);
		expect((await readReview(workshopId)).rows[0]).toMatchObject({ chance: 'unknown', e01: 0 });
		const outlook = await ensureOutlook((await Assessment.findByPk(assessment.id))!, LIGHT_EFFORT);
		const kept = await readReview(workshopId);
		const [january] = outlook.year.months;
		expect(january!.middle).toBeGreaterThan(0);
		expect(kept.rows[0]).toMatchObject({ chance: 'known', e01: Math.round(january!.middle * 1e6) });
		await rebuildReview(workshopId);
		expect(await readReview(workshopId)).toEqual(kept);
	});

	it('is made at the start where installations are from before there was one', async () => {
		const { crew, assessment } = await makeSentSheet('cool');
		await saveFitting(crew.installer, assessment.mountId, FITTED);
		const kept = await readReview(crew.workshopId);
		for (const table of ['review_rows', 'review_months', 'review_dark_days'])
			await connection().query(`DELETE FROM ${table} WHERE workshop_id = ${crew.workshopId}`);
		expect(await completeReviews()).toBe(1);
		expect(await readReview(crew.workshopId)).toEqual(kept);
		expect(await completeReviews()).toBe(0);
	});
});
