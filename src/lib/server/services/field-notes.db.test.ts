import { describe, expect, it } from 'vitest';
import { FITTED, makeFitted, makeRecommended } from '../../../../tests/support/fitted';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { connection } from '../db/connection';
import { presentNote, presentTrend } from '../presenters/field-reports';
import { addFieldNote, keepFieldNote, listFieldNotes, weighFieldNote } from './field-notes';
import { getFitting, saveFitting } from './fittings';
import { getOutlook } from './outlooks';

useTestDatabase();

const LONG_MS = 60_000;
const test = (notedOn: string, capacityAh: number) => ({
	...({ kind: 'capacity-test', notedOn, capacityAh } as const),
	...{ currentA: 5, cutOffV: 10.8, tempC: 25 }
});

async function makeMount() {
	const { installer } = await makeCrew();
	return { installer, ...(await makeFitted(installer)) };
}

describe('notes from the field', () => {
	it(
		'of a cut-out are held against the model: dark in the afternoon after driving is heat',
		{ timeout: LONG_MS },
		async () => {
			const { installer, mountId, assessment } = await makeMount();
			const { cutAtHour, resetAtHour } = assessment.result;
			const { rows } = await addFieldNote(installer, mountId, {
				...{ kind: 'cut-out', notedOn: '2026-02-10', hottestDayC: 44, withinHours: 1 },
				...{ wentDarkHour: cutAtHour!, cameBackHour: resetAtHour }
			});
			const [note] = rows;
			expect(note!.finding!.cause!.finding).toBe('explained');
			expect(note!.finding!.learning!.fits).toBe(true);
			const told = presentNote(note!);
			expect(told.cause!.word).toBe('Yes');
			expect(told.learning!.rows.map(({ label }) => label)).toContain('Dark days a year');
		}
	);

	it(
		'of a cut-out in the small hours look for other causes, and teach nothing',
		{ timeout: LONG_MS },
		async () => {
			const { installer, mountId } = await makeMount();
			const { rows } = await addFieldNote(installer, mountId, {
				...{ kind: 'cut-out', notedOn: '2026-02-10', hottestDayC: 25, withinHours: 0.5 },
				...{ wentDarkHour: 3.5, cameBackHour: 4 }
			});
			const { cause, learning } = rows[0]!.finding!;
			expect(cause!.finding).toBe('not-explained');
			expect(learning).toBeNull();
			expect(presentNote(rows[0]!).cause!.others.length).toBeGreaterThan(3);
		}
	);

	it(
		'of a label change what is to be expected, and the next one starts from there',
		{ timeout: LONG_MS },
		async () => {
			const { installer, mountId } = await makeMount();
			const label = { kind: 'peak-label', place: 'case', hottestDayC: 40 } as const;
			const first = { ...label, notedOn: '2026-02-10', turnedC: null, notTurnedC: 90 };
			const one = await addFieldNote(installer, mountId, first);
			const { learning } = one.rows[0]!.finding!;
			expect(learning!.fits).toBe(true);
			expect(learning!.after.headroomMiddleK).toBeGreaterThan(learning!.before.headroomMiddleK);
			const two = await addFieldNote(installer, mountId, { ...first, notedOn: '2026-03-10' });
			expect(two.rows).toHaveLength(2);
			expect(two.rows[0]!.finding!.learning!.effectiveSamples).toBeLessThanOrEqual(
				learning!.effectiveSamples + 1
			);
		}
	);

	it('go on teaching after one that fitted nothing', { timeout: LONG_MS }, async () => {
		const { installer, mountId } = await makeMount();
		const label = { kind: 'peak-label', place: 'case', hottestDayC: 40 } as const;
		const mistyped = { ...label, notedOn: '2026-02-10', turnedC: 210, notTurnedC: null };
		const one = await addFieldNote(installer, mountId, mistyped);
		expect(one.rows[0]!.finding!.learning!.fits).toBe(false);
		const two = await addFieldNote(installer, mountId, {
			...{ ...label, notedOn: '2026-03-10', turnedC: null, notTurnedC: 90 }
		});
		expect(two.rows[0]!.finding!.learning!.fits).toBe(true);
	});

	it('of capacity tests draw where the capacity goes', async () => {
		const { installer, mountId } = await makeMount();
		await addFieldNote(installer, mountId, test('2026-02-01', 99));
		const { trend, rows, expected } = await addFieldNote(installer, mountId, test('2026-11-30', 94));
		expect(rows.map(({ notedOn }) => notedOn)).toEqual(['2026-11-30', '2026-02-01']);
		expect(trend!.tests.map(({ capacityAh }) => capacityAh)).toEqual([99, 94]);
		expect(expected).toBeNull();
		const told = presentTrend(await listFieldNotes(installer, mountId))!;
		expect(told.sentence).toMatch(/^By 2 tests it is down to 80 % of its rated capacity after/);
		expect(told.tests.map(({ share }) => share)).toEqual([0.99, 0.94]);
		expect(told.named).toBe('');
	});

	it('of capacity tests within months of the fitting say nothing of years', async () => {
		const { installer, mountId } = await makeMount();
		await addFieldNote(installer, mountId, test('2026-02-20', 98));
		await addFieldNote(installer, mountId, test('2026-07-20', 40));
		const told = presentTrend(await listFieldNotes(installer, mountId))!;
		expect(told.sentence).toMatch(/^By 2 tests in its first half year nothing can be said/);
		expect(told).toMatchObject({ rows: [], curves: [] });
	});

	it(
		'of capacity tests are held against the ageing that was expected, and say when a named capacity is reached',
		{ timeout: LONG_MS },
		async () => {
			const { installer, mountId, assessment } = await makeMount();
			await getOutlook(installer, assessment.id);
			await addFieldNote(installer, mountId, test('2026-11-30', 40));
			const notes = await listFieldNotes(installer, mountId, 35);
			const told = presentTrend(notes)!;
			expect(told.named).toMatch(/^35\sAh$/);
			expect(told.rows.every(({ toNamed }) => /year/.test(toNamed))).toBe(true);
			expect(told.curves.map(({ label }) => label)).toEqual(['estimate', 'tests']);
			expect(told.picture).toContain('it ages faster than expected');
			expect(notes.expected![0]!.low).toBeLessThan(notes.expected![0]!.high);
		}
	);

	it('that were weighed at once do not pass each other by: the later one is to be weighed again', async () => {
		const { installer, mountId } = await makeMount();
		const inspection = { kind: 'inspection', notedOn: '2026-02-01', words: 'Hold-down tight.' } as const;
		const weighed = [
			await weighFieldNote(installer, mountId, inspection),
			await weighFieldNote(installer, mountId, inspection)
		];
		await keepFieldNote(installer, mountId, weighed[0]!);
		await expect(keepFieldNote(installer, mountId, weighed[1]!)).rejects.toMatchObject({ code: 'conflict' });
		expect((await listFieldNotes(installer, mountId)).rows).toHaveLength(1);
	});

	it('are kept for good', async () => {
		const { installer, mountId } = await makeMount();
		const inspection = { kind: 'inspection', notedOn: '2026-02-01', words: 'Hold-down tight.' } as const;
		const { rows } = await addFieldNote(installer, mountId, inspection);
		const sql = `UPDATE field_notes SET noted_on = '2026-02-02' WHERE id = ${rows[0]!.id}`;
		await expect(connection().query(sql)).rejects.toThrow('immutable');
	});

	it.each([
		['a day before it was fitted', { notedOn: '2025-12-31' }, 'notedOn'],
		['a label on which nothing was read', { turnedC: null, notTurnedC: null }, 'turnedC']
	])('are refused for %s, and nothing is kept', async (_, change, path) => {
		const { installer, mountId } = await makeMount();
		const label = { kind: 'peak-label', place: 'case', hottestDayC: 40, notedOn: '2026-02-10' } as const;
		const note = { ...label, turnedC: 60, notTurnedC: 65, ...change };
		await expect(addFieldNote(installer, mountId, note)).rejects.toMatchObject({ problems: [{ path }] });
		expect((await listFieldNotes(installer, mountId)).rows).toEqual([]);
	});

	it('take no capacity that the battery cannot have, unless another one was fitted', async () => {
		const { installer, mountId } = await makeMount();
		const refusal = addFieldNote(installer, mountId, test('2026-02-10', 450));
		await expect(refusal).rejects.toMatchObject({ problems: [{ path: 'capacityAh' }] });
		await expect(refusal).rejects.toThrow(/^Capacity found must be at most 150\sAh/);
		const { installation } = await getFitting(installer, mountId);
		const differences = [{ key: 'battery' as const, fitted: 'One of 400 Ah' }];
		await saveFitting(installer, mountId, { ...FITTED, differences, version: installation!.version });
		expect((await addFieldNote(installer, mountId, test('2026-02-10', 450))).rows).toHaveLength(1);
	});

	it('wait until something is fitted, and are not there for another workshop', async () => {
		const { installer } = await makeCrew();
		const { mountId } = await makeRecommended(installer);
		await expect(listFieldNotes(installer, mountId)).rejects.toMatchObject({ code: 'conflict' });
		const { installer: neighbour } = await makeCrew();
		await expect(listFieldNotes(neighbour, mountId)).rejects.toMatchObject({ code: 'not_found' });
	});
});
