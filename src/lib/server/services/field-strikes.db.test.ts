import { describe, expect, it } from 'vitest';
import { readPdf } from '../../../../tests/support/documents';
import { FITTED, makeFitted } from '../../../../tests/support/fitted';
import { readChecks } from '../../../../tests/support/readings';
import { readReview } from '../../../../tests/support/review';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { LIGHT_EFFORT, makeSentSheet } from '../../../../tests/support/sheets';
import { connection } from '../db/connection';
import { Assessment, AuditEntry, Job, Vehicle } from '../db/models';
import { presentNote, presentTrend } from '../presenters/field-reports';
import { completeChecks } from './accuracy/complete-checks';
import { readAccuracy } from './accuracy/read-accuracy';
import { LIGHT_LEARNING } from './field-findings';
import { addFieldNote, keepFieldNote, listFieldNotes, weighFieldNote } from './field-notes';
import { strikeFieldNote } from './field-strikes';
import { getFitting, saveFitting } from './fittings';
import { listMyVehicles } from './my-vehicles';
import { ensureOutlook } from './outlooks';
import { writeMountPaper } from './papers';
import { rebuildReview } from './review/keep-review';

useTestDatabase();

const LONG_MS = 120_000;
const REASON = { reason: '45 was written for 95' };
const INSPECTION = { kind: 'inspection', notedOn: '2026-02-03', words: 'Dry and tight.' } as const;
const LABEL = {
	...({ kind: 'peak-label', place: 'case', notedOn: '2026-02-10', hottestDayC: 40 } as const),
	...{ turnedC: null, notTurnedC: 90 }
};
const DARK = {
	...({ kind: 'cut-out', notedOn: '2026-02-10', hottestDayC: 25, withinHours: 0.5 } as const),
	...{ wentDarkHour: 3.5, cameBackHour: 4 }
};
const test = (notedOn: string, capacityAh: number) => ({
	...({ kind: 'capacity-test', notedOn, capacityAh } as const),
	...{ currentA: 5, cutOffV: 10.8, tempC: 25 }
});
/** As it stands on paper: lines break where the column ends. */
const inOneLine = (text: string): string => text.replace(/\s+/g, ' ');

async function makeMount() {
	const crew = await makeCrew();
	const { fitting, ...made } = await makeFitted(crew.installer);
	const { mountId } = made;
	const { installer } = crew;
	const note = async (data: Parameters<typeof addFieldNote>[2]) => {
		const { rows } = await addFieldNote(installer, mountId, data, LIGHT_LEARNING);
		return Math.max(...rows.map(({ id }) => id));
	};
	const strike = (noteId: number, change = REASON) => strikeFieldNote(installer, mountId, noteId, change);
	return { ...crew, ...made, installationId: fitting.installation!.id, note, strike };
}

describe('a strike', () => {
	it('leaves the note where it was, with who, when and why, and is on the audit trail', async () => {
		const { installer, mountId, note, strike } = await makeMount();
		const noteId = await note(INSPECTION);
		const { rows } = await strike(noteId);
		expect(rows).toMatchObject([{ id: noteId, data: INSPECTION, struck: { by: installer.name, ...REASON } }]);
		const told = presentNote(rows[0]!);
		expect(told.words).toBe(INSPECTION.words);
		expect(told.struck!.who).toMatch(new RegExp(`^Struck out by ${installer.name} on \\d+ \\w+ \\d{4}$`));
		const where = { action: 'mount.field-note-struck', subjectId: mountId };
		expect(await AuditEntry.findAll({ where })).toMatchObject([
			{ personId: installer.id, detail: { noteId, ...REASON } }
		]);
	});

	it('is one for each note: a second is refused, and the first stays', async () => {
		const { installer, mountId, note, strike } = await makeMount();
		const noteId = await note(INSPECTION);
		await strike(noteId);
		const again = strike(noteId, { reason: 'Another reason' });
		await expect(again).rejects.toMatchObject({ code: 'conflict' });
		await expect(again).rejects.toThrow('This note is struck out already');
		const { rows } = await listFieldNotes(installer, mountId);
		expect(rows[0]!.struck).toMatchObject(REASON);
	});

	it('of two people at once is one', async () => {
		const { note, strike } = await makeMount();
		const noteId = await note(INSPECTION);
		const done = await Promise.allSettled([strike(noteId), strike(noteId)]);
		expect(done.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
		const refused = done.find(({ status }) => status === 'rejected');
		expect(refused).toMatchObject({ reason: { code: 'conflict' } });
	});

	it('is not for a note of another mount or workshop, nor for a customer', async () => {
		const { installer, otherMountId, mountId, customer, note } = await makeMount();
		const neighbour = await makeMount();
		const noteId = await note(INSPECTION);
		for (const [person, mount, id] of [
			[installer, otherMountId, noteId],
			[neighbour.installer, neighbour.mountId, noteId],
			[neighbour.installer, mountId, noteId],
			[installer, mountId, await neighbour.note(INSPECTION)]
		] as const) {
			const refusal = strikeFieldNote(person, mount, id, REASON);
			await expect(refusal).rejects.toMatchObject({ code: 'not_found' });
			await expect(refusal).rejects.toThrow(/^There is no such (note|mount) here\.$/);
		}
		const byCustomer = strikeFieldNote(customer, mountId, noteId, REASON);
		await expect(byCustomer).rejects.toMatchObject({ code: 'not_allowed' });
		expect((await listFieldNotes(installer, mountId)).rows[0]!.struck).toBeNull();
	});

	it('is kept for good, with a reason of some length', async () => {
		const { workshopId, installer, note, strike } = await makeMount();
		const noteId = await note(INSPECTION);
		const run = (sql: string) => connection().query(sql);
		const columns = 'workshop_id, field_note_id, created_by, created_at, reason';
		const insert = `INSERT INTO field_note_strikes (${columns}) VALUES`;
		const short = `${insert} (${workshopId}, ${noteId}, ${installer.id}, NOW(3), 'oops')`;
		await expect(run(short)).rejects.toThrow('field_note_strikes_reason');
		await strike(noteId);
		const which = `field_note_strikes WHERE field_note_id = ${noteId}`;
		await expect(run(`DELETE FROM ${which}`)).rejects.toThrow('immutable');
		const change = `UPDATE field_note_strikes SET reason = 'Something else' WHERE field_note_id = ${noteId}`;
		await expect(run(change)).rejects.toThrow('immutable');
	});
});

describe('a note that was struck out', () => {
	it('does not bend where the capacity goes', async () => {
		const { installer, mountId, note, strike } = await makeMount();
		await note(test('2026-02-01', 99));
		const before = await listFieldNotes(installer, mountId);
		const slip = await note(test('2026-11-01', 45));
		expect((await listFieldNotes(installer, mountId)).trend).not.toEqual(before.trend);
		const after = await strike(slip);
		expect(after.trend).toEqual(before.trend);
		expect(presentTrend(after)!.sentence).toMatch(/^By one test /);
	});

	it('leaves no trend where it was the only test', async () => {
		const { note, strike } = await makeMount();
		expect((await strike(await note(test('2026-02-01', 45)))).trend).toBeNull();
	});

	it('does not hold the day of fitting', async () => {
		const { installer, mountId, note, strike } = await makeMount();
		const slip = await note({ ...INSPECTION, notedOn: FITTED.fittedOn });
		const { version } = (await getFitting(installer, mountId)).installation!;
		const later = { ...FITTED, fittedOn: '2026-02-15', version };
		await expect(saveFitting(installer, mountId, later)).rejects.toMatchObject({ code: 'invalid_input' });
		await strike(slip);
		const { installation } = await saveFitting(installer, mountId, later);
		expect(installation!.fittedOn).toBe('2026-02-15');
	});

	it('is no reported cut-out of the review, now or when that is made anew', async () => {
		const { workshopId, assessment, note, strike } = await makeMount();
		await ensureOutlook((await Assessment.findByPk(assessment.id))!, LIGHT_EFFORT);
		const darkDays = async () => (await readReview(workshopId)).rows[0]!.dark_days;
		const slip = await note(DARK);
		await note({ ...DARK, notedOn: '2026-02-12' });
		expect(await darkDays()).toBe(2);
		await strike(slip);
		expect(await darkDays()).toBe(1);
		const kept = await readReview(workshopId);
		await rebuildReview(workshopId);
		expect(await readReview(workshopId)).toEqual(kept);
	}, 120_000);

	it(
		'does not count among the predictions that were held, and the one that it had put right counts again',
		async () => {
			const { engineer, installationId, note, strike } = await makeMount();
			await note({ ...LABEL, turnedC: 50 });
			const slip = await note({ ...LABEL, turnedC: 62, notTurnedC: 68 });
			const leftOut = async () => (await readChecks(installationId)).map(({ left_out }) => left_out);
			expect(await leftOut()).toEqual(['noted-again', '']);
			await strike(slip);
			expect(await leftOut()).toEqual(['', 'struck']);
			const { temperatures, leftOut: told } = await readAccuracy(engineer);
			expect(temperatures.map(({ all }) => all.readings)).toEqual([1]);
			expect(told).toMatchObject([{ kind: 'label', why: 'struck', readings: 1 }]);
			const kept = await readChecks(installationId);
			await completeChecks();
			expect(await readChecks(installationId)).toEqual(kept);
		},
		LONG_MS
	);

	it(
		'is neither a capacity that was held against its band, nor a look at the battery, nor a day that was dark',
		async () => {
			const { engineer, workshopId, assessment, installationId, note, strike } = await makeMount();
			const waiting = async () => (await readAccuracy(engineer)).capacity?.waiting ?? 0;
			const early = await note(test('2026-10-01', 45));
			expect(await waiting()).toBe(1);
			await strike(early);
			expect(await waiting()).toBe(0);
			await ensureOutlook((await Assessment.findByPk(assessment.id))!, LIGHT_EFFORT);
			await note(test('2026-11-01', 92));
			const slips = [await note(test('2026-11-01', 45)), await note({ ...DARK, notedOn: '2026-11-20' })];
			const checks = () => readChecks(installationId);
			expect(await checks()).toMatchObject([
				{ kind: 'capacity', read_on: '2026-10-01', left_out: 'struck' },
				{ kind: 'capacity', measured: expect.closeTo(0.92, 2), left_out: 'noted-again' },
				{ kind: 'capacity', measured: expect.closeTo(0.45, 2), left_out: '' },
				{ kind: 'cut-out', read_on: '2026-11-20', measured: 1, is_looked_at: 1 }
			]);
			for (const slip of slips) await strike(slip);
			expect(await checks()).toMatchObject([
				{ left_out: 'struck' },
				{ measured: expect.closeTo(0.92, 2), left_out: '' },
				{ measured: expect.closeTo(0.45, 2), left_out: 'struck' },
				{ kind: 'cut-out', read_on: '2026-11-01', measured: 0 }
			]);
			const kept = await checks();
			await rebuildReview(workshopId);
			expect(await checks()).toEqual(kept);
		},
		LONG_MS
	);
});

describe('what later notes learnt', () => {
	it(
		'with a reading that is struck out does not count, says so, and counts again once it is noted anew',
		async () => {
			const { installer, mountId, note, strike } = await makeMount();
			const second = { ...LABEL, notedOn: '2026-03-10' };
			// What it teaches by itself, with nothing noted before.
			const alone = await weighFieldNote(installer, mountId, second, LIGHT_LEARNING);
			const slip = await note({ ...LABEL, notTurnedC: 70 });
			const secondId = await note(second);
			const rowOf = async (id: number) =>
				(await listFieldNotes(installer, mountId)).rows.find((row) => row.id === id)!;
			expect((await rowOf(secondId)).restsOnStruck).toBeNull();

			await strike(slip);
			expect((await rowOf(secondId)).restsOnStruck).toMatchObject({ noteId: slip, isNotedAnew: false });
			const told = presentNote(await rowOf(secondId)).learning!;
			expect(told.rows).toEqual([]);
			expect(told.sentence).toMatch(/rested on the note of 10 February 2026, .* does not count\. Note this/);

			const anew = await rowOf(await note(second));
			expect(anew.restsOnStruck).toBeNull();
			expect(anew.finding).toEqual(alone.finding);
			expect((await rowOf(secondId)).finding).not.toEqual(alone.finding);
			expect(presentNote(await rowOf(secondId)).learning!.sentence).toContain('was noted once more');
		},
		LONG_MS
	);

	it('is weighed again where a reading is struck out between weighing and keeping', async () => {
		const { installer, mountId, note, strike } = await makeMount();
		const slip = await note(LABEL);
		const second = { ...LABEL, notedOn: '2026-03-10' };
		const weighed = await weighFieldNote(installer, mountId, second, LIGHT_LEARNING);
		await strike(slip);
		const refusal = keepFieldNote(installer, mountId, weighed);
		await expect(refusal).rejects.toMatchObject({ code: 'conflict' });
		await expect(refusal).rejects.toThrow('struck it out');
		expect((await listFieldNotes(installer, mountId)).rows).toHaveLength(1);
	}, 120_000);
});

describe('others read', () => {
	it(
		'on the warranty file that a note was struck out, by whom and why, and no trend of it',
		async () => {
			const { installer, mountId, note, strike } = await makeMount();
			const slip = await note(test('2026-03-02', 45));
			const read = async () =>
				inOneLine((await readPdf(await writeMountPaper(installer, mountId, 'warranty-file'))).text);
			expect(await read()).toContain('Where its capacity goes');
			await strike(slip);
			const text = await read();
			expect(text).toContain('Capacity test, struck out');
			expect(text).toContain(REASON.reason);
			expect(text).not.toContain('Where its capacity goes');
		},
		LONG_MS
	);

	it(
		'as the customer that it was struck out, without its figures or the reason, and nothing learnt from it',
		async () => {
			const { crew, jobId, assessment } = await makeSentSheet();
			const { installer, customer } = crew;
			const { mountId } = assessment;
			const { vehicleId } = (await Job.findByPk(jobId))!;
			await Vehicle.update({ customerId: customer.customerId! }, { where: { id: vehicleId } });
			await saveFitting(installer, mountId, FITTED);
			const noted = [
				await addFieldNote(installer, mountId, LABEL, LIGHT_LEARNING),
				await addFieldNote(installer, mountId, { ...LABEL, notedOn: '2026-03-10' }, LIGHT_LEARNING),
				await addFieldNote(installer, mountId, test('2026-04-01', 45))
			];
			expect((await listMyVehicles(customer))[0]!.lessons).toHaveLength(2);
			for (const view of [noted[0]!, noted[2]!])
				await strikeFieldNote(installer, mountId, view.rows[0]!.id, REASON);

			const [{ lessons, history }] = (await listMyVehicles(customer)) as [
				Awaited<ReturnType<typeof listMyVehicles>>[number]
			];
			expect(lessons).toEqual([]);
			const wordsOf = (title: string) =>
				history.filter((entry) => entry.title === title).map(({ words }) => words);
			const struck = /^Struck out by the shop on \d+ \w+ \d{4}: it does not count\.$/;
			expect(wordsOf('Capacity tested')).toEqual([expect.stringMatching(struck)]);
			expect(wordsOf('Heat label read')).toEqual([
				'No field of it has turned.',
				expect.stringMatching(struck)
			]);
		},
		LONG_MS
	);
});
