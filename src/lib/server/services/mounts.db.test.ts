import { describe, expect, it } from 'vitest';
import type { SurveyAnswers } from '$lib/schemas/survey';
import { makeBareJob } from '../../../../tests/support/jobs';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { AuditEntry } from '../db/models';
import { addMount, getMount, listMounts, removeMount, restoreMount, saveSurvey } from './mounts';

useTestDatabase();

const BESIDE_GUARD = { name: 'Beside the left guard', positionKind: 'under-bonnet' } as const;
const IN_CABIN: SurveyAnswers = {
	positionKind: 'cabin',
	enclosureCooling: 'cooled',
	enclosureSun: 'unknown'
};

async function makeJob() {
	const crew = await makeCrew();
	return { crew, installer: crew.installer, jobId: await makeBareJob(crew.installer) };
}

describe('mounts of a job', () => {
	it('get the letters A, B, C as they are added, and begin with an empty survey', async () => {
		const { installer, jobId } = await makeJob();
		const first = await addMount(installer, jobId, BESIDE_GUARD);
		await addMount(installer, jobId, { name: 'Behind the seat', positionKind: 'cabin' });
		expect(first).toMatchObject({ letter: 'A', surveyComplete: false, version: 0, jobId });
		expect(first.survey).toEqual({ positionKind: 'under-bonnet' });
		const mounts = await listMounts(installer, jobId);
		expect(mounts.map(({ letter, name }) => [letter, name])).toEqual([
			['A', 'Beside the left guard'],
			['B', 'Behind the seat']
		]);
	});

	it('never hand out one letter twice, however many are added at once', async () => {
		const { installer, jobId } = await makeJob();
		const added = await Promise.all(
			['left', 'right', 'front', 'rear', 'top'].map((name) =>
				addMount(installer, jobId, { ...BESIDE_GUARD, name })
			)
		);
		expect(added.map((mount) => mount.letter).sort()).toEqual(['A', 'B', 'C', 'D', 'E']);
	});

	it('are at most six at a time', async () => {
		const { installer, jobId } = await makeJob();
		for (let count = 0; count < 6; count++) await addMount(installer, jobId, BESIDE_GUARD);
		await expect(addMount(installer, jobId, BESIDE_GUARD)).rejects.toMatchObject({
			code: 'conflict',
			message: 'A job compares at most 6 positions: remove one first.'
		});
	});

	it('come back with their letter and answers after they were removed', async () => {
		const { installer, jobId } = await makeJob();
		const mount = await addMount(installer, jobId, { name: 'Behind the seat', positionKind: 'cabin' });
		await saveSurvey(installer, mount.id, { survey: IN_CABIN, complete: true, version: mount.version });
		await removeMount(installer, mount.id);
		await expect(getMount(installer, mount.id)).rejects.toMatchObject({ code: 'not_found' });
		expect(await listMounts(installer, jobId)).toEqual([]);
		expect((await addMount(installer, jobId, BESIDE_GUARD)).letter).toBe('B');
		await restoreMount(installer, mount.id);
		expect(await getMount(installer, mount.id)).toMatchObject({
			letter: 'A',
			survey: IN_CABIN,
			surveyComplete: true
		});
	});

	it('are left alone when one that stands is put back', async () => {
		const { installer, jobId } = await makeJob();
		const mount = await addMount(installer, jobId, BESIDE_GUARD);
		expect(await restoreMount(installer, mount.id)).toEqual(mount);
	});

	it('cannot come back where six stand already', async () => {
		const { installer, jobId } = await makeJob();
		const mount = await addMount(installer, jobId, BESIDE_GUARD);
		await removeMount(installer, mount.id);
		for (let count = 0; count < 6; count++) await addMount(installer, jobId, BESIDE_GUARD);
		await expect(restoreMount(installer, mount.id)).rejects.toMatchObject({ code: 'conflict' });
	});
});

describe('a survey', () => {
	it('keeps each answer, "I do not know" too, and counts up its version', async () => {
		const { installer, jobId } = await makeJob();
		const mount = await addMount(installer, jobId, { name: 'Behind the seat', positionKind: 'cabin' });
		const saved = await saveSurvey(installer, mount.id, {
			...{ survey: IN_CABIN, complete: false, version: mount.version }
		});
		expect(saved).toMatchObject({ survey: IN_CABIN, surveyComplete: false, version: mount.version + 1 });
		expect(await getMount(installer, mount.id)).toEqual(saved);
	});

	it('moves the mount to another kind of place when the answers are for one', async () => {
		const { installer, jobId } = await makeJob();
		const mount = await addMount(installer, jobId, BESIDE_GUARD);
		const saved = await saveSurvey(installer, mount.id, {
			...{ survey: IN_CABIN, complete: true, version: mount.version }
		});
		expect(saved.positionKind).toBe('cabin');
	});

	it('is not finished while a question that is asked has no answer', async () => {
		const { installer, jobId } = await makeJob();
		const mount = await addMount(installer, jobId, { name: 'Behind the seat', positionKind: 'cabin' });
		const survey: SurveyAnswers = { positionKind: 'cabin', enclosureCooling: 'cooled' };
		await expect(
			saveSurvey(installer, mount.id, { survey, complete: true, version: mount.version })
		).rejects.toMatchObject({
			code: 'invalid_input',
			problems: [{ path: 'survey.enclosureSun' }]
		});
		expect((await getMount(installer, mount.id)).survey).toEqual({ positionKind: 'cabin' });
	});

	it('refuses a save against an older version and stores nothing of it', async () => {
		const { installer, jobId, crew } = await makeJob();
		const mount = await addMount(installer, jobId, { name: 'Behind the seat', positionKind: 'cabin' });
		const save = { complete: false, version: mount.version };
		await saveSurvey(crew.engineer, mount.id, { ...save, survey: IN_CABIN });
		const mine: SurveyAnswers = { positionKind: 'cabin', enclosureSun: 'shaded' };
		await expect(saveSurvey(installer, mount.id, { ...save, survey: mine })).rejects.toMatchObject({
			code: 'changed_meanwhile'
		});
		expect((await getMount(installer, mount.id)).survey).toEqual(IN_CABIN);
	});

	it('is written into the audit trail', async () => {
		const { installer, jobId } = await makeJob();
		const mount = await addMount(installer, jobId, { name: 'Behind the seat', positionKind: 'cabin' });
		await saveSurvey(installer, mount.id, { survey: IN_CABIN, complete: true, version: mount.version });
		const entries = await AuditEntry.findAll({
			where: { workshopId: installer.workshopId, subjectType: 'mount', subjectId: mount.id },
			order: [['sequence', 'ASC']]
		});
		expect(entries.map(({ action, personId }) => [action, personId])).toEqual([
			['mount.added', installer.id],
			['mount.surveyed', installer.id]
		]);
	});
});

describe('mounts of another workshop', () => {
	it('are not there, whatever is asked', async () => {
		const { installer, jobId } = await makeJob();
		const { id, version } = await addMount(installer, jobId, BESIDE_GUARD);
		const { installer: stranger } = await makeCrew();
		const asks = [
			() => getMount(stranger, id),
			() => listMounts(stranger, jobId),
			() => addMount(stranger, jobId, BESIDE_GUARD),
			() => saveSurvey(stranger, id, { survey: IN_CABIN, complete: false, version }),
			() => removeMount(stranger, id),
			() => restoreMount(stranger, id)
		];
		for (const ask of asks) await expect(ask()).rejects.toMatchObject({ code: 'not_found' });
		expect(await getMount(installer, id)).toMatchObject({ version, positionKind: 'under-bonnet' });
	});

	it('are not for customers', async () => {
		const { crew, installer, jobId } = await makeJob();
		const { id } = await addMount(installer, jobId, BESIDE_GUARD);
		await expect(getMount(crew.customer, id)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(removeMount(crew.customer, id)).rejects.toMatchObject({ code: 'not_allowed' });
	});
});
