import { describe, expect, it } from 'vitest';
import type { JobView } from '$lib/schemas/jobs';
import { findNextStep, type Around } from './next-step';

/** Only what the next step looks at; the rest of the sheet plays no part in it. */
const job = (changes: object): JobView =>
	({
		...{ id: 7, stage: 'survey', battery: {}, place: {}, hotDay: {}, dayPlan: {}, mounts: [], standings: [] },
		...changes
	}) as unknown as JobView;

const MOUNT_A = { id: 1, letter: 'A', name: 'Front corner', surveyComplete: true };
const MOUNT_B = { id: 2, letter: 'B', name: 'Rear corner', surveyComplete: true };
const standing = (mountId: number, changedSince: string[] = []) => ({ mountId, changedSince });

const find = (given: JobView, around: Partial<Around> = {}) =>
	findNextStep(given, { recommendedMountId: null, fitted: [], ...around });

describe('the next step of a job', () => {
	it.each([
		['a battery', { battery: null }, 'Choose the battery', '/jobs/7/battery'],
		['a place', { place: null }, 'Choose the place and hot day', '/jobs/7/climate'],
		['a hot day', { hotDay: null }, 'Choose the place and hot day', '/jobs/7/climate'],
		['a day plan', { dayPlan: null }, 'Draw the day', '/jobs/7/day'],
		['a position', {}, 'Add the first position', '/jobs/7/mounts/new']
	])('is to give it %s', (_, changes, label, href) => {
		expect(find(job(changes))).toMatchObject({ label, href });
	});

	it('goes by the order of the work when several things are missing', () => {
		const bare = job({ battery: null, place: null, dayPlan: null });
		expect(find(bare)?.label).toBe('Choose the battery');
	});

	it('is the survey of the first mount that has open questions', () => {
		const mounts = [MOUNT_A, { ...MOUNT_B, surveyComplete: false }];
		expect(find(job({ mounts }))).toMatchObject({
			label: 'Survey mount B',
			href: '/mounts/2/survey'
		});
	});

	it('is to assess what was never assessed, by the button itself', () => {
		const step = find(job({ mounts: [MOUNT_A, MOUNT_B], standings: [standing(1)] }));
		expect(step).toMatchObject({ label: 'Assess', href: null });
		expect(step?.text).toContain('mount B');
	});

	it('is to assess again what changed, even after the sheet was sent', () => {
		const changed = { stage: 'sent', mounts: [MOUNT_A], standings: [standing(1, ['battery'])] };
		expect(find(job(changed))).toMatchObject({ label: 'Assess again', href: null });
	});

	it('is to compare where there is more than one position, and to recommend where there is one', () => {
		const two = { stage: 'assessed', mounts: [MOUNT_A, MOUNT_B], standings: [standing(1), standing(2)] };
		expect(find(job(two))?.href).toBe('/jobs/7/compare');
		const one = { stage: 'assessed', mounts: [MOUNT_A], standings: [standing(1)] };
		expect(find(job(one))?.href).toBe('/jobs/7/recommendation');
	});

	it('is to send the sheet, then to look after it, then to fit', () => {
		const at = (stage: string) =>
			find(job({ stage, mounts: [MOUNT_A], standings: [standing(1)] }), { recommendedMountId: 1 });
		expect(at('recommended')?.label).toBe('Send the customer’s sheet');
		expect(at('sent')?.label).toBe('See what was sent');
		expect(at('acknowledged')).toMatchObject({ label: 'Say what was fitted', href: '/mounts/1/fitted' });
	});

	const dates = (nextDueOn: string | null, isOverdue = false, at = MOUNT_A) => ({
		...{ mountId: at.id, letter: at.letter, nextDueOn, isOverdue, mismatch: null }
	});
	const OPEN_B = { ...MOUNT_B, surveyComplete: false };
	const [late, later, done] = [dates('2026-03-04', true), dates('2026-09-04'), dates(null)];
	const lateB = dates('2026-03-04', true, MOUNT_B);

	it.each([
		[
			'an overdue look',
			'acknowledged',
			[late],
			1,
			'Look at mount A',
			'/mounts/1/fitted#dates',
			'4 March 2026'
		],
		[
			'an overdue look, sheet never sent',
			'recommended',
			[late],
			1,
			'Look at mount A',
			'/mounts/1/fitted#dates',
			'due on'
		],
		[
			'an overdue look before another mount',
			'recommended',
			[late],
			2,
			'Look at mount A',
			'/mounts/1/fitted#dates',
			'due on'
		],
		[
			'an overdue look at the second of two',
			'sent',
			[later, lateB],
			1,
			'Look at mount B',
			'/mounts/2/fitted#dates',
			'due on'
		],
		[
			'a look to come',
			'acknowledged',
			[later],
			1,
			'See the dates',
			'/mounts/1/fitted#dates',
			'4 September 2026'
		],
		[
			'a look to come, sheet not acknowledged',
			'sent',
			[later],
			1,
			'See the dates',
			'/mounts/1/fitted#dates',
			'Mount A'
		],
		[
			'all looks done',
			'acknowledged',
			[done],
			1,
			'Note what the field says',
			'/mounts/1/field',
			'every look'
		],
		[
			'all looks done, sheet never sent',
			'recommended',
			[done],
			1,
			'Send the customer’s sheet',
			'/jobs/7/sheets',
			'has not gone to the customer'
		],
		[
			'all done here, another mount recommended since',
			'recommended',
			[done],
			2,
			'Send the customer’s sheet',
			'/jobs/7/sheets',
			'One page'
		],
		[
			'all done here, another acknowledged since',
			'acknowledged',
			[done],
			2,
			'Say what was fitted',
			'/mounts/2/fitted',
			'the fitting'
		]
	])('fitted, with %s', (_, stage, fitted, recommendedMountId, label, href, words) => {
		const mounts = [MOUNT_A, MOUNT_B];
		const given = job({ stage, mounts, standings: [standing(1), standing(2)] });
		const step = find(given, { fitted, recommendedMountId });
		expect(step).toMatchObject({ label, href });
		expect(step?.text).toContain(words);
	});

	it('leaves positions that were not chosen alone once one is fitted, and assesses what is fitted again', () => {
		const around = { fitted: [later], recommendedMountId: 1 };
		const given = { stage: 'acknowledged', mounts: [MOUNT_A, OPEN_B] };
		expect(find(job({ ...given, standings: [standing(1)] }), around)?.label).toBe('See the dates');
		const changed = { ...given, standings: [standing(1, ['battery'])] };
		expect(find(job(changed), around)?.label).toBe('Assess again');
	});

	it.each([
		['assess', 'Assess it as it was fitted', '/jobs/7/battery'],
		['recommend', 'Recommend it as it was fitted', '/jobs/7/recommendation'],
		['hold', 'Hold the fitting against the newer recommendation', '/mounts/1/fitted#agreement']
	] as const)('with another battery fitted, is to %s it', (mismatch, label, href) => {
		const around = { fitted: [{ ...later, mismatch }], recommendedMountId: 1 };
		const given = { stage: 'acknowledged', mounts: [MOUNT_A] };
		expect(find(job({ ...given, standings: [standing(1)] }), around)).toMatchObject({ label, href });
		const overdue = { fitted: [{ ...late, mismatch }], recommendedMountId: 1 };
		expect(find(job({ ...given, standings: [standing(1)] }), overdue)).toMatchObject({ label, href });
	});

	it('with another battery fitted and chosen for the job, is to assess again', () => {
		const around = { fitted: [{ ...late, mismatch: 'assess' as const }], recommendedMountId: 1 };
		const given = { stage: 'acknowledged', mounts: [MOUNT_A] };
		const changed = (what: string) => job({ ...given, standings: [standing(1, [what])] });
		expect(find(changed('battery'), around)).toMatchObject({ label: 'Assess again', href: null });
		expect(find(changed('hot-day'), around)?.label).toBe('Assess it as it was fitted');
	});
});
