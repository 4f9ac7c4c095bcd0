import { describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { finishOutlook, type OutlookEffort, type OutlookProgress } from '$lib/thermal/outlook';
import { connection } from '../db/connection';
import { Assessment, AssessmentOutlook } from '../db/models';
import { canonicalJson } from '../hash';
import { assessMount } from './assessments';
import { saveCable } from './mounts';
import { ensureOutlook, findOutlook, followOutlook, getOutlook, peekOutlook } from './outlooks';
import { getRemedyList, saveRemedyList } from './remedy-lists';

useTestDatabase();

/** Enough to go through every part, too little to be believed. */
const LIGHT: OutlookEffort = {
	daySamples: 16,
	yearSamples: 2,
	influencePoints: 2,
	influenceReplicates: 2,
	remedySamples: 2,
	remediesTogether: 1,
	envelopeSamples: 0
};
const CABLE = {
	areaMm2: 16,
	insulationC: 90,
	laying: 'in a tube',
	conductorLengthM: 6,
	fuseRatedA: 60
} as const;

async function assessedMount(withCable = false) {
	const crew = await makeCrew();
	const { hot } = await makeAssessableJob(crew.installer);
	if (withCable) await saveCable(crew.installer, hot.id, { cable: CABLE, version: hot.version });
	const { id } = await assessMount(crew.installer, { mountId: hot.id });
	return { ...crew, assessment: (await Assessment.findByPk(id))! };
}

describe('the outlook of an assessment', () => {
	it('is worked out once, kept, and comes back to the last digit', async () => {
		const { assessment } = await assessedMount();
		expect(await findOutlook(assessment.id)).toBeNull();
		const made = await ensureOutlook(assessment, LIGHT);
		expect(made.day.samples).toBe(16);
		expect(canonicalJson(await ensureOutlook(assessment, LIGHT))).toBe(canonicalJson(made));
		expect(await AssessmentOutlook.count({ where: { assessmentId: assessment.id } })).toBe(1);
	});

	it('can be made again from the request that is kept with it', async () => {
		const { assessment } = await assessedMount(true);
		await ensureOutlook(assessment, LIGHT);
		const { request, outlook } = (await AssessmentOutlook.findOne({
			where: { assessmentId: assessment.id }
		}))!;
		expect(canonicalJson(finishOutlook(request))).toBe(canonicalJson(outlook));
	});

	it('is the same work for two who ask at once', async () => {
		const { assessment } = await assessedMount();
		const [one, other] = await Promise.all([
			ensureOutlook(assessment, LIGHT),
			ensureOutlook(assessment, LIGHT)
		]);
		expect(other).toEqual(one);
		expect(await AssessmentOutlook.count({ where: { assessmentId: assessment.id } })).toBe(1);
	});

	it('tells how far it is to who follows it, and ends', async () => {
		const { assessment, installer } = await assessedMount();
		const work = ensureOutlook(assessment, { ...LIGHT, daySamples: 256 });
		const heard: OutlookProgress[] = [];
		await followOutlook(installer, assessment.id, (progress) => heard.push(progress));
		await work;
		expect(heard.length).toBeGreaterThan(1);
		const shares = heard.map(({ share }) => share);
		expect(shares).toEqual([...shares].sort((a, b) => a - b));
	});

	it('says of the cable and fuse what the hottest air leaves of them', async () => {
		const { assessment } = await assessedMount(true);
		const { cable } = await ensureOutlook(assessment, LIGHT);
		// The curve is thinned for drawing: the hottest minute may lie between two of its points.
		const drawnC = Math.max(...assessment.result.curves.airC);
		expect(cable!.airC).toBeGreaterThanOrEqual(drawnC - 0.01);
		expect(cable!.airC).toBeLessThan(drawnC + 5);
		expect(cable!.findings.map(({ check }) => check)).toContain('fuse rating is within the cable');
		const { assessment: without } = await assessedMount();
		expect((await ensureOutlook(without, LIGHT)).cable).toBeNull();
	});

	it('takes the figures that the workshop asks for its remedies', async () => {
		const { assessment, manager } = await assessedMount();
		await saveRemedyList(manager, {
			moneyPerHour: 0,
			offers: [{ key: 'wrap', cost: 7, hours: 0, offered: true }],
			version: null
		});
		const { remedies } = await ensureOutlook(assessment, LIGHT);
		expect(remedies.alone.find(({ keys }) => keys[0] === 'wrap')).toMatchObject({ cost: 7, hours: 0 });
		expect(remedies.moneyPerHour).toBe(0);
	});

	it('cannot be changed or taken away by any program', async () => {
		const { assessment } = await assessedMount();
		await ensureOutlook(assessment, LIGHT);
		await expect(connection().query('UPDATE assessment_outlooks SET outlook = "{}"')).rejects.toThrow(
			'immutable'
		);
		await expect(connection().query('DELETE FROM assessment_outlooks')).rejects.toThrow('immutable');
	});

	it('of another workshop is not there', async () => {
		const { assessment } = await assessedMount();
		const { installer: stranger } = await makeCrew();
		const none = { code: 'not_found' };
		await expect(getOutlook(stranger, assessment.id)).rejects.toMatchObject(none);
		await expect(peekOutlook(stranger, assessment.id, () => {})).rejects.toMatchObject(none);
		await expect(followOutlook(stranger, assessment.id, () => {})).rejects.toMatchObject(none);
	});
});

describe('the list of remedies', () => {
	it('has the usual figures until the workshop keeps its own, which nobody else sees', async () => {
		const { manager, installer } = await makeCrew();
		const usual = await getRemedyList(installer);
		expect(usual.version).toBeNull();
		expect(usual.offers.length).toBeGreaterThan(8);
		const offers = usual.offers.map(({ key, cost, hours }) => ({
			key,
			cost: cost + 1,
			hours,
			offered: key !== 'fan'
		}));
		const kept = await saveRemedyList(manager, { moneyPerHour: 120, offers, version: null });
		expect(kept).toMatchObject({ moneyPerHour: 120, version: 0 });
		expect((await getRemedyList(installer)).offers.find(({ key }) => key === 'fan')!.offered).toBe(false);
		const { installer: stranger } = await makeCrew();
		expect((await getRemedyList(stranger)).version).toBeNull();
	});

	it('is not the installer’s to change, and not to be changed unseen', async () => {
		const { manager, engineer, installer } = await makeCrew();
		const list = { moneyPerHour: 90, offers: [], version: null };
		await expect(saveRemedyList(installer, list)).rejects.toMatchObject({ code: 'not_allowed' });
		const { version } = await saveRemedyList(engineer, list);
		await saveRemedyList(manager, { ...list, moneyPerHour: 95, version });
		await expect(saveRemedyList(engineer, { ...list, version })).rejects.toMatchObject({
			code: 'changed_meanwhile'
		});
		await expect(saveRemedyList(engineer, list)).rejects.toMatchObject({ code: 'changed_meanwhile' });
	});
});
