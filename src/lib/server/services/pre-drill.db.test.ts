import { describe, expect, it } from 'vitest';
import { makeBareJob } from '../../../../tests/support/jobs';
import { AGM_BATTERY, BATTERY } from '../../../../tests/support/records';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { AuditEntry, BatteryRecord, Job } from '../db/models';
import { SURVEY_FIELDS } from '$lib/thermal/survey';
import { createBattery } from './batteries';
import { addMount } from './mounts';
import {
	getPreDrill,
	listPreDrillQuestions,
	saveAndSignPreDrill,
	savePreDrill,
	signPreDrill,
	snapshotPreDrill
} from './pre-drill';

useTestDatabase();

async function makeMount(battery = BATTERY, positionKind: 'under-bonnet' | 'cabin' = 'under-bonnet') {
	const crew = await makeCrew();
	const { installer } = crew;
	const jobId = await makeBareJob(installer);
	const { id } = await createBattery(installer, battery);
	await Job.update({ batteryRecordId: id }, { where: { id: jobId } });
	const mount = await addMount(installer, jobId, { name: 'Left guard', positionKind });
	return { crew, installer, mountId: mount.id, jobId };
}
const HOLDS = { answer: 'holds', note: '' } as const;
const MISSING = { answer: 'does-not', note: 'No fuse at the starting battery.' } as const;

describe('the check before drilling', () => {
	it('asks by position and battery: gaps under the bonnet, fresh air for what gives off gas, a way out for gas inside', async () => {
		const keysOf = async (...where: Parameters<typeof makeMount>) => {
			const { installer, mountId } = await makeMount(...where);
			return (await getPreDrill(installer, mountId)).questions.map(({ key }) => key);
		};
		const lithiumUnderBonnet = await keysOf();
		expect(lithiumUnderBonnet).toContain('clearance');
		expect(lithiumUnderBonnet).not.toContain('air');
		expect(await keysOf(AGM_BATTERY)).toContain('air');
		const inCabin = await keysOf(BATTERY, 'cabin');
		expect(inCabin).toContain('failingCell');
		expect(inCabin).not.toContain('clearance');
	});

	it('asks whether the maker’s condition is kept, in its words, beside what the survey says of the heat', async () => {
		const { installer, mountId, jobId } = await makeMount();
		const ofMaker = async () =>
			(await getPreDrill(installer, mountId)).questions.find(({ key }) => key === 'makerCondition');
		expect(await ofMaker()).toMatchObject({
			question: 'Is the maker’s condition kept here: “Not above 75 °C at the case.”?',
			answer: null,
			beside: expect.arrayContaining([
				{ label: SURVEY_FIELDS.exhaustGapMm.label, value: expect.any(String) },
				{ label: SURVEY_FIELDS.shieldKind.label, value: expect.any(String) }
			]) as unknown
		});
		const failed = { answer: 'does-not', note: 'It sees the manifold.' } as const;
		const saved = await savePreDrill(installer, mountId, { answers: { makerCondition: failed }, version: 0 });
		expect(saved.open.find(({ key }) => key === 'makerCondition')).toMatchObject({
			...{ state: 'failed', label: 'The maker’s condition', note: failed.note }
		});
		const same = { answers: { makerCondition: HOLDS }, version: saved.version };
		expect((await savePreDrill(installer, mountId, same)).open.map(({ key }) => key)).not.toContain(
			'makerCondition'
		);
		const { batteryRecordId } = (await Job.findByPk(jobId))!;
		const where = { id: batteryRecordId! };
		await BatteryRecord.update({ underBonnetWords: 'Not in view of the exhaust.' }, { where });
		expect(await ofMaker()).toMatchObject({ quote: 'Not in view of the exhaust.', answer: null });
		await BatteryRecord.update({ underBonnet: 'silent' }, { where });
		expect(await ofMaker()).toBeUndefined();
	});

	it('does not ask for a condition of the bonnet in the cabin', async () => {
		const { installer, mountId } = await makeMount(BATTERY, 'cabin');
		const keys = (await getPreDrill(installer, mountId)).questions.map(({ key }) => key);
		expect(keys).not.toContain('makerCondition');
	});

	it('asks nothing yet where the job has no battery, so that photos can come before it', async () => {
		const { installer, mountId, jobId } = await makeMount();
		expect(await listPreDrillQuestions(installer, mountId)).not.toEqual([]);
		await Job.update({ batteryRecordId: null }, { where: { id: jobId } });
		expect(await listPreDrillQuestions(installer, mountId)).toEqual([]);
		await expect(getPreDrill(installer, mountId)).rejects.toMatchObject({ code: 'conflict' });
	});

	it('begins with everything open, and keeps answers with what is missing', async () => {
		const { installer, mountId } = await makeMount();
		const before = await getPreDrill(installer, mountId);
		expect(before.open).toHaveLength(before.questions.length);
		const answers = { behindPanel: HOLDS, fuse: MISSING };
		const after = await savePreDrill(installer, mountId, { answers, version: before.version });
		expect(after.open).toHaveLength(before.questions.length - 1);
		expect(after.open.find(({ key }) => key === 'fuse')).toMatchObject({
			state: 'failed',
			note: MISSING.note
		});
		expect(await getPreDrill(installer, mountId)).toEqual(after);
	});

	it('is signed as it stands, and not any more once an answer is another', async () => {
		const { installer, mountId } = await makeMount();
		const saved = await savePreDrill(installer, mountId, { answers: { fuse: MISSING }, version: 0 });
		const signed = await signPreDrill(installer, mountId, { name: 'Ida Fenn', version: saved.version });
		expect(signed).toMatchObject({ signedBy: 'Ida Fenn', signedAt: expect.any(String) });
		const same = await savePreDrill(installer, mountId, {
			answers: { fuse: MISSING },
			version: signed.version
		});
		expect(same.signedBy).toBe('Ida Fenn');
		const changed = await savePreDrill(installer, mountId, {
			answers: { fuse: HOLDS },
			version: same.version
		});
		expect(changed).toMatchObject({ signedBy: null, signedAt: null });
		const actions = await AuditEntry.findAll({ where: { subjectType: 'mount', subjectId: mountId } });
		expect(actions.map(({ action }) => action)).toContain('mount.pre-drill-signed');
	});

	it('is not signed for what was not asked at the time, and says that it was signed before', async () => {
		const { installer, mountId, jobId } = await makeMount();
		const { questions } = await getPreDrill(installer, mountId);
		const answers = Object.fromEntries(questions.map(({ key }) => [key, HOLDS]));
		const signed = await saveAndSignPreDrill(installer, mountId, { answers, name: 'Ida Fenn', version: 0 });
		expect(signed).toMatchObject({ open: [], signedBy: 'Ida Fenn', signedBefore: null });
		const where = { id: (await Job.findByPk(jobId))!.batteryRecordId! };
		await BatteryRecord.update({ underBonnetWords: 'Not in view of the exhaust.' }, { where });
		expect(await getPreDrill(installer, mountId)).toMatchObject({
			...{ open: [{ key: 'makerCondition', state: 'unanswered' }], signedBy: null, signedAt: null },
			signedBefore: { by: 'Ida Fenn', at: signed.signedAt }
		});
		expect(await snapshotPreDrill(installer, mountId)).toMatchObject({ signedBy: null, signedAt: null });
		await BatteryRecord.update({ underBonnetWords: BATTERY.underBonnetWords }, { where });
		expect(await getPreDrill(installer, mountId)).toEqual(signed);
	});

	it('is kept and signed at once, or neither', async () => {
		const { installer, mountId } = await makeMount();
		const first = await savePreDrill(installer, mountId, { answers: { fuse: HOLDS }, version: 0 });
		const nothing = { answers: {}, name: 'Ida Fenn', version: first.version };
		await expect(saveAndSignPreDrill(installer, mountId, nothing)).rejects.toMatchObject({
			code: 'conflict'
		});
		expect(await getPreDrill(installer, mountId)).toEqual(first);
		const both = { ...nothing, answers: { fuse: MISSING } };
		const signed = await saveAndSignPreDrill(installer, mountId, both);
		expect(signed.signedBy).toBe('Ida Fenn');
		expect(signed.open.find(({ key }) => key === 'fuse')).toMatchObject({ note: MISSING.note });
	});

	it('gives a recommendation what is open at that moment', async () => {
		const { installer, mountId } = await makeMount();
		await savePreDrill(installer, mountId, { answers: { fuse: MISSING }, version: 0 });
		const { open, signedBy } = await snapshotPreDrill(installer, mountId);
		expect(open.filter(({ state }) => state === 'failed').map(({ key }) => key)).toEqual(['fuse']);
		expect(signedBy).toBeNull();
	});

	it.each([
		['what is not asked here', { air: HOLDS }, 0, 'invalid_input'],
		['an older version', { fuse: HOLDS }, 3, 'changed_meanwhile']
	])('refuses %s', async (_, answers, version, code) => {
		const { installer, mountId } = await makeMount();
		await expect(savePreDrill(installer, mountId, { answers, version })).rejects.toMatchObject({ code });
	});

	it('cannot be signed empty, nor asked before the battery is known', async () => {
		const { installer, mountId, jobId } = await makeMount();
		await expect(signPreDrill(installer, mountId, { name: 'Ida', version: 0 })).rejects.toMatchObject({
			code: 'conflict'
		});
		await Job.update({ batteryRecordId: null }, { where: { id: jobId } });
		await expect(getPreDrill(installer, mountId)).rejects.toMatchObject({ code: 'conflict' });
	});

	it('is not there for another workshop', async () => {
		const { mountId } = await makeMount();
		const { installer } = await makeCrew();
		await expect(getPreDrill(installer, mountId)).rejects.toMatchObject({ code: 'not_found' });
	});
});
