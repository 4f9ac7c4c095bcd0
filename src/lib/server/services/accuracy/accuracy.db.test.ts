import { describe, expect, it } from 'vitest';
import { FITTED, makeFitted } from '../../../../../tests/support/fitted';
import { askReadings, inventLabels, readChecks } from '../../../../../tests/support/readings';
import { LIGHT_EFFORT } from '../../../../../tests/support/sheets';
import { makeCrew, useTestDatabase } from '../../../../../tests/support/services';
import { connection } from '../../db/connection';
import { Assessment } from '../../db/models';
import { assessMount } from '../assessments';
import { today } from '../days';
import { addFieldNote } from '../field-notes';
import { finishFollowUp, saveFitting } from '../fittings';
import { getJob, setJobClimate } from '../jobs';
import { removeMount, restoreMount } from '../mounts';
import { ensureOutlook } from '../outlooks';
import { rebuildReview } from '../review/keep-review';
import { completeChecks } from './complete-checks';
import { listReadings, walkReadings } from './list-readings';
import { readAccuracy } from './read-accuracy';
import { writeAccuracyCsv } from './accuracy-csv';

useTestDatabase();

const LONG_MS = 120_000;
const LABEL = {
	...({ kind: 'peak-label', place: 'case', notedOn: '2026-02-10', hottestDayC: 40 } as const),
	...{ turnedC: 60, notTurnedC: 65 }
};
const CAPACITY = {
	...({ kind: 'capacity-test', notedOn: '2026-11-01', capacityAh: 90 } as const),
	...{ currentA: 5, cutOffV: 10.8, tempC: 25 }
};
const DARK = {
	...({ kind: 'cut-out', notedOn: '2026-02-10', hottestDayC: 25, withinHours: 0.5 } as const),
	...{ wentDarkHour: 3.5, cameBackHour: 4 }
};

async function makeWatched() {
	const crew = await makeCrew();
	const { jobId, mountId, assessment, fitting } = await makeFitted(crew.installer);
	const installationId = fitting.installation!.id;
	const kept = await Assessment.findByPk(assessment.id);
	const { workshopId, bookId } = kept!;
	const about = { workshopId, mountId, installationId, assessmentId: assessment.id, bookId };
	return { crew, jobId, fitting, kept: kept!, about, ...about };
}

describe('a label', () => {
	it(
		'is held against the assessment of its day, not against a later one',
		async () => {
			const { crew, jobId, mountId, assessmentId, installationId } = await makeWatched();
			const { installer, engineer } = crew;
			await addFieldNote(installer, mountId, { ...LABEL, notedOn: today() });
			const [before] = await readChecks(installationId);
			expect(before).toMatchObject({ assessment_id: assessmentId, kind: 'label', measured: 62.5 });

			// A cooler day is another assessment: what was read before it stays where it was.
			const job = await getJob(installer, jobId);
			const hotDay = { ...job.hotDay!, hotDayMaxC: job.hotDay!.hotDayMaxC - 6 };
			const place = { placeId: job.place!.id, daysOnRoad: null, version: job.version };
			await setJobClimate(installer, jobId, { ...hotDay, ...place });
			const later = await assessMount(installer, { mountId });
			expect(later.id).not.toBe(assessmentId);
			await rebuildReview(crew.workshopId);
			await completeChecks();
			expect(await readChecks(installationId)).toEqual([before]);

			// What is read now is held against what is in force now; a day before either goes with what was agreed.
			const below = { turnedC: null, notTurnedC: 120 };
			await addFieldNote(installer, mountId, { ...LABEL, ...below, place: 'cells', notedOn: today() });
			await addFieldNote(installer, mountId, LABEL);
			const { readings } = await listReadings(engineer, askReadings());
			const of = (place: string, day: string) =>
				readings.find(({ label, readOn }) => label?.place === place && readOn === day);
			expect(of('cells', today())).toMatchObject({ assessmentId: later.id, isEnteredLater: false });
			expect(of('case', today())).toMatchObject({ assessmentId, isEnteredLater: false });
			expect(of('case', '2026-02-10')).toMatchObject({ assessmentId, isEnteredLater: true });
		},
		LONG_MS
	);

	it(
		'that fits nothing, or was put right the same day, is left out and counted',
		async () => {
			const { crew, mountId, installationId } = await makeWatched();
			const { installer, engineer } = crew;
			await addFieldNote(installer, mountId, { ...LABEL, turnedC: 140, notTurnedC: 145 });
			await addFieldNote(installer, mountId, {
				...LABEL,
				notedOn: '2026-03-10',
				turnedC: 45,
				notTurnedC: 50
			});
			await addFieldNote(installer, mountId, { ...LABEL, notedOn: '2026-03-10' });
			const kept = await readChecks(installationId);
			expect(kept.map(({ left_out }) => left_out)).toEqual(['fits-nothing', 'noted-again', '']);
			const { temperatures, leftOut } = await readAccuracy(engineer);
			expect(temperatures.map(({ kind, all }) => [kind, all.readings])).toEqual([['label', 1]]);
			expect(leftOut).toHaveLength(2);
			expect(leftOut).toContainEqual({ kind: 'label', why: 'fits-nothing', readings: 1, inside: 0 });
			expect(leftOut).toContainEqual({ kind: 'label', why: 'noted-again', readings: 1, inside: 0 });
			const counted = await listReadings(engineer, askReadings());
			expect(counted.readings.map(({ measured }) => measured)).toEqual([62.5]);
			const others = await listReadings(engineer, askReadings({ show: 'left-out' }));
			expect(others.readings.map(({ measured }) => measured)).toEqual([142.5, 47.5]);
		},
		LONG_MS
	);

	it(
		'that says one side only is told apart, and has no error',
		async () => {
			const { crew, mountId } = await makeWatched();
			await addFieldNote(crew.installer, mountId, { ...LABEL, turnedC: null, notTurnedC: 120 });
			const { temperatures } = await readAccuracy(crew.manager);
			expect(temperatures[0]!.all).toMatchObject({
				readings: 0,
				oneSided: 1,
				oneSidedOutside: 0,
				bias: null
			});
			const { readings } = await listReadings(crew.manager, askReadings());
			expect(readings[0]).toMatchObject({
				...{ measured: null, error: null, deviations: 0, stand: 'inside' },
				label: { place: 'case', turnedC: null, notTurnedC: 120 }
			});
		},
		LONG_MS
	);

	it(
		'from before it was held against anything is held at the start, once',
		async () => {
			const { crew, mountId, installationId } = await makeWatched();
			await addFieldNote(crew.installer, mountId, { ...LABEL, notedOn: today() });
			const kept = await readChecks(installationId);
			await connection().query(`DELETE FROM prediction_checks WHERE installation_id = ${installationId}`);
			expect((await completeChecks()).labels).toBeGreaterThanOrEqual(1);
			expect(await readChecks(installationId)).toEqual(kept);
			expect((await completeChecks()).labels).toBe(0);
			expect(await readChecks(installationId)).toEqual(kept);
		},
		LONG_MS
	);
});

describe('figures', () => {
	it('come with enough readings alone: one too few says so', async () => {
		const { crew, about } = await makeWatched();
		await inventLabels(about, [1, 2, 3, 8]);
		const few = (await readAccuracy(crew.engineer)).temperatures[0]!;
		expect(few.all).toMatchObject({ readings: 4, bias: null, rootMeanSquare: null, insideShare: null });
		await inventLabels(about, [-4]);
		const { all, by, steps } = (await readAccuracy(crew.engineer)).temperatures[0]!;
		expect(all).toMatchObject({ readings: 5, bias: 2, inside: 4 });
		expect(all.rootMeanSquare).toBeCloseTo(Math.sqrt(94 / 5), 10);
		// 4 of 5 after Clopper and Pearson.
		expect(all.insideShare!.value).toBe(0.8);
		expect(all.insideShare!.low).toBeCloseTo(0.2836, 4);
		expect(all.insideShare!.high).toBeCloseTo(0.9949, 4);
		expect(by.book.map(({ key, figures }) => [key, figures.bias])).toEqual([['1', 2]]);
		expect(by.zone.map(({ key }) => key)).toEqual(['BWh']);
		expect(by.position.map(({ key }) => key)).toEqual(['under-bonnet']);
		expect(
			steps.filter(({ readings }) => readings > 0).map(({ fromK, readings }) => [fromK, readings])
		).toEqual([
			[-4, 1],
			[0, 1],
			[2, 2],
			[8, 1]
		]);
	});

	it('and readings are those of the own workshop, and not for everybody in it', async () => {
		const { crew, about } = await makeWatched();
		await inventLabels(about, [1, 2, 3, 4, 5]);
		const neighbour = await makeWatched();
		await inventLabels(neighbour.about, [-9]);
		expect((await readAccuracy(crew.manager)).temperatures[0]!.all).toMatchObject({ readings: 5, bias: 3 });
		const seen = await listReadings(neighbour.crew.manager, askReadings());
		expect(seen.readings.map(({ error }) => error)).toEqual([-9]);
		const stranger = await makeCrew();
		expect(await readAccuracy(stranger.engineer)).toMatchObject({
			...{ temperatures: [], cutOuts: null, capacity: null, leftOut: [] }
		});
		for (const person of [crew.installer, crew.customer]) {
			await expect(readAccuracy(person)).rejects.toMatchObject({ code: 'not_allowed' });
			await expect(listReadings(person, askReadings())).rejects.toMatchObject({ code: 'not_allowed' });
		}
	});

	it('leave out what was read of a mount that was taken away', async () => {
		const { crew, about, mountId } = await makeWatched();
		await inventLabels(about, [1]);
		await removeMount(crew.installer, mountId);
		expect((await readAccuracy(crew.engineer)).temperatures).toEqual([]);
		await restoreMount(crew.installer, mountId);
		expect((await readAccuracy(crew.engineer)).temperatures).toHaveLength(1);
	});
});

describe('single readings', () => {
	it('come the furthest off first, page by page, each once, and narrowed by what the address says', async () => {
		const { crew, about } = await makeWatched();
		await inventLabels(about, [1, -7, 4, 4, 0]);
		const errors: (number | null)[] = [];
		let cursor: string | undefined;
		for (let page = 0; page < 3; page++) {
			const { readings, total, next } = await listReadings(crew.engineer, askReadings({ limit: 2, cursor }));
			expect(total).toBe(5);
			errors.push(...readings.map(({ error }) => error));
			cursor = next ?? undefined;
		}
		expect(cursor).toBeUndefined();
		expect(errors).toEqual([-7, 4, 4, 1, 0]);
		const totalOf = async (query: object) => (await listReadings(crew.engineer, askReadings(query))).total;
		expect(await totalOf({ kind: 'label', book: 1, zone: 'BWh', position: 'under-bonnet' })).toBe(5);
		for (const other of [{ kind: 'capacity' }, { book: 2 }, { zone: 'Aw' }, { position: 'cabin' }])
			expect(await totalOf(other)).toBe(0);
		const walked = [];
		for await (const batch of walkReadings(crew.engineer, askReadings(), 2)) walked.push(...batch);
		expect(walked.map(({ error }) => error)).toEqual(errors);
	});

	it('refuse a page of another workshop’s list', async () => {
		const { crew, about } = await makeWatched();
		await inventLabels(about, [1, 2]);
		const { next } = await listReadings(crew.engineer, askReadings({ limit: 1 }));
		const { engineer } = await makeCrew();
		await expect(listReadings(engineer, askReadings({ cursor: next! }))).rejects.toMatchObject({
			code: 'invalid_input'
		});
	});

	it('go out as a table, in which text cannot start a formula', async () => {
		const { crew, about, mountId } = await makeWatched();
		await connection().query(`UPDATE mounts SET name = '=1+1' WHERE id = ${mountId}`);
		await inventLabels(about, [-7.25]);
		let text = '';
		for await (const part of writeAccuracyCsv(crew.engineer, askReadings())) text += part;
		expect(text.charCodeAt(0)).toBe(0xfeff);
		const [heads, row] = text.slice(1).split('\r\n');
		const cells = row!.split(',');
		const cellOf = (head: string) => cells[heads!.split(',').indexOf(head)];
		expect(cellOf('Error')).toBe('-7.25');
		expect(cellOf('Unit')).toBe('K');
		expect(text).not.toMatch(/(^|,)"?=/m);
	});
});

describe('reported cut-outs', () => {
	it(
		'are held against what was stated, as long as somebody looked or reported, and follow what is done',
		async () => {
			const { crew, mountId, installationId, kept, fitting } = await makeWatched();
			const { installer, manager } = crew;
			const rows = async () => (await readChecks(installationId)).filter(({ kind }) => kind === 'cut-out');
			const outlook = await ensureOutlook(kept, LIGHT_EFFORT);
			expect(await rows()).toEqual([]);

			await addFieldNote(installer, mountId, DARK);
			const [reported] = await rows();
			expect(reported).toMatchObject({
				...{ measured: 1, read_on: '2026-02-10', observed_days: 10, is_looked_at: 0 },
				...{ is_entered_later: 1, assessment_id: kept.id }
			});
			// Of January one day is left, of February ten days.
			const [january, february] = outlook.year.months;
			expect(reported!.predicted).toBeCloseTo(january!.middle / 31 + (february!.middle * 10) / 28, 6);

			const [first] = fitting.followUps;
			await finishFollowUp(installer, first!.id, { isDone: true, version: first!.version });
			const [looked] = await rows();
			expect(looked).toMatchObject({ measured: 1, read_on: today(), is_looked_at: 1 });
			expect(Number(looked!.predicted)).toBeGreaterThan(Number(reported!.predicted));
			expect(Number(looked!.chance)).toBeGreaterThan(Number(reported!.chance));

			await saveFitting(installer, mountId, {
				...{ ...FITTED, fittedOn: '2026-01-15', version: fitting.installation!.version }
			});
			expect((await rows())[0]!.observed_days).toBe(Number(looked!.observed_days) + 16);
			const { cutOuts } = await readAccuracy(manager);
			expect(cutOuts!.all).toMatchObject({ installations: 1, lookedAt: 1, reportedDays: 1, ratio: null });
			expect(cutOuts!.chances.reduce((sum, { installations }) => sum + installations, 0)).toBe(1);
			expect(cutOuts!.chances.reduce((sum, { wentDark }) => sum + wentDark, 0)).toBe(1);
			const kept2 = await readChecks(installationId);
			await rebuildReview(crew.workshopId);
			expect(await readChecks(installationId)).toEqual(kept2);
		},
		LONG_MS
	);
});

describe('a capacity test', () => {
	it(
		'waits for the outlook of its assessment, and is then held against the band at its age',
		async () => {
			const { crew, mountId, installationId, kept } = await makeWatched();
			const { installer, engineer } = crew;
			await addFieldNote(installer, mountId, { ...CAPACITY, capacityAh: 40 });
			await addFieldNote(installer, mountId, CAPACITY);
			expect((await readAccuracy(engineer)).capacity).toMatchObject({ waiting: 2, all: { readings: 0 } });
			const { life } = await ensureOutlook(kept, LIGHT_EFFORT);
			const tests = (await readChecks(installationId)).filter(({ kind }) => kind === 'capacity');
			expect(tests.map(({ left_out }) => left_out)).toEqual(['noted-again', '']);
			const years = 274 / 365.25;
			const [first] = life!.years;
			expect(tests[1]!.low).toBeCloseTo(1 - (1 - first!.low) * years, 6);
			expect(tests[1]!.measured).toBeCloseTo(90 / kept.inputs.battery.capacityAh, 10);
			expect((await readAccuracy(engineer)).capacity).toMatchObject({ waiting: 0, all: { readings: 1 } });
		},
		LONG_MS
	);
});
