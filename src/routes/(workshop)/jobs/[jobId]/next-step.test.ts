import { describe, expect, it } from 'vitest';
import type { JobView } from '$lib/schemas/jobs';
import { findNextStep } from './next-step';

/** Only what the next step looks at; the rest of the sheet plays no part in it. */
const job = (changes: object): JobView =>
	({
		...{ id: 7, stage: 'survey', battery: {}, place: {}, hotDay: {}, dayPlan: {}, mounts: [], standings: [] },
		...changes
	}) as unknown as JobView;

const MOUNT_A = { id: 1, letter: 'A', name: 'Front corner', surveyComplete: true };
const MOUNT_B = { id: 2, letter: 'B', name: 'Rear corner', surveyComplete: true };
const standing = (mountId: number, changedSince: string[] = []) => ({ mountId, changedSince });

describe('the next step of a job', () => {
	it.each([
		['a battery', { battery: null }, 'Choose the battery', '/jobs/7/battery'],
		['a place', { place: null }, 'Choose the place and hot day', '/jobs/7/climate'],
		['a hot day', { hotDay: null }, 'Choose the place and hot day', '/jobs/7/climate'],
		['a day plan', { dayPlan: null }, 'Draw the day', '/jobs/7/day'],
		['a position', {}, 'Add the first position', '/jobs/7/mounts/new']
	])('is to give it %s', (_, changes, label, href) => {
		expect(findNextStep(job(changes))).toMatchObject({ label, href });
	});

	it('goes by the order of the work when several things are missing', () => {
		const bare = job({ battery: null, place: null, dayPlan: null });
		expect(findNextStep(bare)?.label).toBe('Choose the battery');
	});

	it('is the survey of the first mount that has open questions', () => {
		const mounts = [MOUNT_A, { ...MOUNT_B, surveyComplete: false }];
		expect(findNextStep(job({ mounts }))).toMatchObject({
			label: 'Survey mount B',
			href: '/mounts/2/survey'
		});
	});

	it('is to assess what was never assessed, by the button itself', () => {
		const step = findNextStep(job({ mounts: [MOUNT_A, MOUNT_B], standings: [standing(1)] }));
		expect(step).toMatchObject({ label: 'Assess', href: null });
		expect(step?.text).toContain('mount B');
	});

	it('is to assess again what changed, even after the sheet was sent', () => {
		const changed = { stage: 'sent', mounts: [MOUNT_A], standings: [standing(1, ['battery'])] };
		expect(findNextStep(job(changed))).toMatchObject({ label: 'Assess again', href: null });
	});

	it('is to compare where there is more than one position, and to recommend where there is one', () => {
		const two = { stage: 'assessed', mounts: [MOUNT_A, MOUNT_B], standings: [standing(1), standing(2)] };
		expect(findNextStep(job(two))?.href).toBe('/jobs/7/compare');
		const one = { stage: 'assessed', mounts: [MOUNT_A], standings: [standing(1)] };
		expect(findNextStep(job(one))?.href).toBe('/jobs/7/recommendation');
	});

	it('is to send the sheet, then to look after it, then nothing', () => {
		const at = (stage: string) => findNextStep(job({ stage, mounts: [MOUNT_A], standings: [standing(1)] }));
		expect(at('recommended')?.label).toBe('Send the customer’s sheet');
		expect(at('sent')?.label).toBe('See what was sent');
		expect(at('acknowledged')).toBeNull();
	});
});
