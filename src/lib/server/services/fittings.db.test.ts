import { describe, expect, it } from 'vitest';
import { FITTED, makeFitted, makeRecommended } from '../../../../tests/support/fitted';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { Customer, FollowUp, Job, OutgoingMail } from '../db/models';
import { addDays, addMonths, daysBetween, today } from './days';
import { writeCalendar } from './follow-up-calendar';
import { addFieldNote } from './field-notes';
import { finishFollowUp, getFitting, listFitted, saveFitting } from './fittings';
import { removeMount } from './mounts';
import { remindDue } from './reminders';

useTestDatabase();

describe('days', () => {
	it('go on by months to the same day, or to the last of a shorter month', () => {
		expect(addMonths('2026-01-31', 1)).toBe('2026-02-28');
		expect(addMonths('2028-01-31', 1)).toBe('2028-02-29');
		expect(addMonths('2026-11-15', 12)).toBe('2027-11-15');
		expect(addDays('2026-02-28', 1)).toBe('2026-03-01');
		expect(daysBetween('2026-01-01', '2027-01-01')).toBe(365);
	});
});

describe('what was fitted', () => {
	it('is held against what was agreed, difference by difference', async () => {
		const { installer } = await makeCrew();
		const { mountId, assessment } = await makeRecommended(installer);
		const before = await getFitting(installer, mountId);
		expect(before).toMatchObject({ installation: null, followUps: [], assessmentId: assessment.id });
		expect(before.agreed.map(({ key }) => key)).toContain('battery');
		const differences = [{ key: 'fuse' as const, fitted: '80 A' }];
		const fitting = await saveFitting(installer, mountId, { ...FITTED, differences });
		expect(fitting.installation).toMatchObject({ fittedOn: '2026-01-31', differences });
		expect(await getFitting(installer, mountId)).toEqual(fitting);
	});

	it('sets dates after one, six and twelve months, and moves those not done with the day of fitting', async () => {
		const { installer } = await makeCrew();
		const { mountId, fitting } = await makeFitted(installer);
		expect(fitting.followUps.map(({ dueOn }) => dueOn)).toEqual(['2026-02-28', '2026-07-31', '2027-01-31']);
		const [first] = fitting.followUps;
		const done = await finishFollowUp(installer, first!.id, { isDone: true, version: first!.version });
		expect(done.followUps[0]).toMatchObject({ doneBy: installer.name, isOverdue: false });
		const { version } = done.installation!;
		const moved = await saveFitting(installer, mountId, { ...FITTED, fittedOn: '2026-02-10', version });
		expect(moved.followUps.map(({ dueOn }) => dueOn)).toEqual(['2026-02-28', '2026-08-10', '2027-02-10']);
		const later = { ...FITTED, fittedOn: '2026-03-05', version: moved.installation!.version };
		const [looked] = (await saveFitting(installer, mountId, later)).followUps;
		expect(looked).toMatchObject({ dueOn: '2026-04-05' });
		expect(looked!.doneOn).not.toBeNull();
	});

	it('refuses an older version', async () => {
		const { installer } = await makeCrew();
		const { mountId } = await makeFitted(installer);
		await expect(saveFitting(installer, mountId, { ...FITTED, version: 7 })).rejects.toMatchObject({
			code: 'changed_meanwhile'
		});
	});

	it('was not fitted after somebody had noted something of it, or looked at it', async () => {
		const { installer } = await makeCrew();
		const { mountId, fitting } = await makeFitted(installer);
		const move = (fittedOn: string, version: number) =>
			saveFitting(installer, mountId, { ...FITTED, fittedOn, version });
		await addFieldNote(installer, mountId, { kind: 'inspection', notedOn: '2026-02-20', words: 'Sound.' });
		const { installation } = await move('2026-02-20', fitting.installation!.version);
		await expect(move('2026-02-21', installation!.version)).rejects.toMatchObject({
			message: 'Fitted on must not be after the first field note of it, 20 February 2026.',
			problems: [{ path: 'fittedOn' }]
		});
		const other = await makeFitted(installer);
		const [look] = other.fitting.followUps;
		await finishFollowUp(installer, look!.id, { isDone: true, version: look!.version });
		await FollowUp.update({ doneOn: '2026-03-01' }, { where: { id: look!.id } });
		await expect(
			saveFitting(installer, other.mountId, {
				...{ ...FITTED, fittedOn: '2026-03-02' },
				version: other.fitting.installation!.version
			})
		).rejects.toThrow('Fitted on must not be after the first look at it, 1 March 2026.');
	});

	it('waits for a recommendation, and is not there for another workshop', async () => {
		const { installer } = await makeCrew();
		const { mountId, otherMountId } = await makeRecommended(installer);
		await expect(getFitting(installer, otherMountId)).rejects.toMatchObject({ code: 'conflict' });
		const { installer: neighbour } = await makeCrew();
		await expect(getFitting(neighbour, mountId)).rejects.toMatchObject({ code: 'not_found' });
	});
});

describe('the dates', () => {
	it('go into a calendar file, each with an identity of its own', async () => {
		const { installer } = await makeCrew();
		const { mountId, fitting } = await makeFitted(installer);
		const text = await writeCalendar(installer, mountId);
		expect(text.match(/BEGIN:VEVENT/g)).toHaveLength(3);
		for (const { id } of fitting.followUps) expect(text).toContain(`UID:follow-up-${id}@soakline.invalid`);
		expect(text).toContain('DTSTART;VALUE=DATE:20260228');
		expect(await writeCalendar(installer, mountId)).toBe(text);
	});

	it('are reminded of once, however often and by however many it is looked', async () => {
		const { installer } = await makeCrew();
		const { jobId, fitting } = await makeFitted(installer);
		const job = await Job.findByPk(jobId);
		await Customer.update({ email: 'ilse@travellers.example' }, { where: { id: job!.customerId } });
		const where = { workshopId: installer.workshopId, recipient: 'ilse@travellers.example' };
		await remindDue('2026-02-20');
		expect(await OutgoingMail.count({ where })).toBe(0);
		await Promise.all([remindDue('2026-02-21'), remindDue('2026-02-21'), remindDue('2026-02-21')]);
		await remindDue('2026-02-22');
		const letters = await OutgoingMail.findAll({ where });
		expect(letters).toHaveLength(1);
		expect(letters[0]!.textBody).toContain('on 28 February 2026 or thereabouts');
		const reminded = await FollowUp.findByPk(fitting.followUps[0]!.id);
		expect(reminded!.remindedAt).not.toBeNull();
	});

	it('that are long past, or of a mount that was taken away, are not reminded of', async () => {
		const { installer } = await makeCrew();
		const { fitting } = await makeFitted(installer);
		const removed = await makeFitted(installer);
		await removeMount(installer, removed.mountId);
		await remindDue('2027-01-20');
		const remindedOf = async ({ followUps }: typeof fitting) =>
			(
				await FollowUp.findAll({ where: { id: followUps.map(({ id }) => id) }, order: [['dueOn', 'ASC']] })
			).map(({ remindedAt }) => remindedAt !== null);
		expect(await remindedOf(fitting)).toEqual([false, false, false]);
		await remindDue('2027-01-24');
		expect(await remindedOf(fitting)).toEqual([false, false, true]);
		expect(await remindedOf(removed.fitting)).toEqual([false, false, false]);
	});

	it('say which look is next, and which would be early', async () => {
		const { installer, customer } = await makeCrew();
		const { mountId, jobId } = await makeRecommended(installer);
		expect(await listFitted(installer, jobId)).toEqual([]);
		const fitting = await saveFitting(installer, mountId, { ...FITTED, fittedOn: addDays(today(), -40) });
		const [first, second, third] = fitting.followUps;
		expect(fitting.followUps.map(({ isEarly }) => isEarly)).toEqual([false, true, true]);
		const fitted = { mountId, letter: 'A', mismatch: null };
		expect(await listFitted(installer, jobId)).toEqual([
			{ ...fitted, nextDueOn: first!.dueOn, isOverdue: true }
		]);
		await finishFollowUp(installer, first!.id, { isDone: true, version: first!.version });
		expect(await listFitted(installer, jobId)).toEqual([
			{ ...fitted, nextDueOn: second!.dueOn, isOverdue: false }
		]);
		for (const { id, version } of [second!, third!])
			await finishFollowUp(installer, id, { isDone: true, version });
		expect((await getFitting(installer, mountId)).followUps.some(({ isEarly }) => isEarly)).toBe(false);
		expect(await listFitted(installer, jobId)).toEqual([{ ...fitted, nextDueOn: null, isOverdue: false }]);
		await expect(listFitted(customer, jobId)).rejects.toMatchObject({ code: 'not_allowed' });
	});

	it('that were done are not reminded of', async () => {
		const { installer } = await makeCrew();
		const { fitting } = await makeFitted(installer);
		for (const { id, version } of fitting.followUps)
			await finishFollowUp(installer, id, { isDone: true, version });
		await remindDue('2030-01-01');
		const reminded = await FollowUp.findAll({ where: { id: fitting.followUps.map(({ id }) => id) } });
		expect(reminded.map(({ remindedAt }) => remindedAt)).toEqual([null, null, null]);
	});
});
