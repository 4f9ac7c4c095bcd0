import { beforeEach, describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../../tests/support/assessable-job';
import { makeFittable } from '../../../../../tests/support/fit-traces';
import { checksOf, confirmLegs, saveOneStop } from '../../../../../tests/support/held-traces';
import { askReadings } from '../../../../../tests/support/readings';
import { makeCrew, useTestDatabase, type Crew } from '../../../../../tests/support/services';
import { dayText, readAs, sendTrace, type Confirmed } from '../../../../../tests/support/traces';
import { fitInputSchema } from '$lib/schemas/fits';
import { legsChangeSchema } from '$lib/schemas/traces';
import type { TraceView } from '$lib/schemas/traces';
import { FIT_CHANNELS } from '$lib/thermal/fit';
import { TraceModel } from '$lib/thermal/fit/trace-model';
import { connection } from '../../db/connection';
import { Assessment, Trace } from '../../db/models';
import { assessMount } from '../assessments';
import { moveBook } from '../book-changes';
import { today } from '../days';
import { draftFittedBook } from '../fit-books';
import { createFit, followFit, prepareFit } from '../fits';
import { getJob, setJobClimate } from '../jobs';
import { removeMount, restoreMount } from '../mounts';
import { traceToFit } from '../trace-scenario';
import { saveLegs } from '../trace-views';
import { removeTrace, restoreTrace } from '../traces';
import { completeChecks } from './complete-checks';
import { listReadings } from './list-readings';
import { readAccuracy } from './read-accuracy';

useTestDatabase();

const PRIOR = { law: 'lognormal', middle: 2.5, spread: 0.35 };
const LONG_MS = 120_000;
let crew: Crew;
let mountId: number;
let otherMountId: number;
let jobId: number;

beforeEach(async () => {
	crew = await makeCrew();
	const made = await makeAssessableJob(crew.installer);
	({ jobId } = made);
	mountId = made.hot.id;
	otherMountId = made.cool.id;
});

const sendDay = async (text = dayText(), said: Confirmed = {}) =>
	readAs(crew.engineer, await sendTrace(crew.engineer, mountId, text), said);

/** The cells, minute by minute, as the model has them on the day of a trace. */
async function foretellCells(traceId: number, assessmentId: number): Promise<Float64Array> {
	const assessment = (await Assessment.findByPk(assessmentId))!;
	const { trace, scenario } = await traceToFit((await Trace.findByPk(traceId))!, assessment, []);
	const model = new TraceModel({ trace, scenario, start: { kind: 'air' } }, []);
	const starts = model.starts.map(({ mean }) => mean);
	return model.predict([], starts)[FIT_CHANNELS.filter((each) => model.foretells(each)).indexOf('cellC')]!;
}

/** The same job on a cooler day: another assessment. */
async function assessCooler() {
	const job = await getJob(crew.installer, jobId);
	const hotDay = { ...job.hotDay!, hotDayMaxC: job.hotDay!.hotDayMaxC - 6 };
	const place = { placeId: job.place!.id, daysOnRoad: null, version: job.version };
	await setJobClimate(crew.installer, jobId, { ...hotDay, ...place });
	return assessMount(crew.installer, { mountId });
}

/** A book with what one trace tells, in the place of the book that holds. */
async function putFitInForce({ id: traceId }: TraceView) {
	const { engineer, manager } = crew;
	const coefficients = [{ group: 'battery', key: 'caseCellConductance', prior: PRIOR }];
	const asked = { name: 'One day', traces: [{ traceId }], coefficients, leaveOut: false };
	const input = fitInputSchema.parse(asked);
	const { id: fitId } = await createFit(engineer, input, await prepareFit(engineer, input));
	await followFit(engineer, fitId);
	const { id, version } = await draftFittedBook(engineer, fitId, { name: 'One day', note: '' });
	const onTrial = await moveBook(engineer, id, { to: 'on-trial', version });
	return moveBook(manager, id, { to: 'in-force', version: onTrial.version });
}

describe('a measured trace', () => {
	it('is held against the assessment that was there before it, the mean over its minutes', async () => {
		const assessment = await assessMount(crew.installer, { mountId });
		const trace = await sendDay(dayText({ date: today() }));
		expect(await checksOf(trace.id)).toMatchObject([{ left_out: 'legs-open' }]);
		await confirmLegs(crew.engineer, trace);
		const [check, ...others] = await checksOf(trace.id);
		expect(others).toEqual([]);
		expect(check).toMatchObject({
			...{ kind: 'trace', assessment_id: assessment.id, place: 'cells', read_on: today() },
			...{ is_entered_later: 0, left_out: '', mount_id: mountId, installation_id: null }
		});
		// The mean of the file's cells, worked out here: air 24 °C rising 1 K an hour, 4 K above it for 2 of 6 hours, 1 K else.
		const minutes = Array.from({ length: 360 }, (_, at) => at);
		const cellC = minutes.map((at) => 24 + at / 60 + (at >= 60 && at < 180 ? 4 : 1) + (at % 7) / 10);
		expect(check!.measured).toBeCloseTo(cellC.reduce((sum, c) => sum + c, 0) / 360, 1);
		expect(Number(check!.measured) - Number(check!.predicted)).toBeCloseTo(Number(check!.error), 9);
		// Mean and mean square against the day as the model runs it, worked out here minute by minute.
		const foretoldC = await foretellCells(trace.id, assessment.id);
		const errors = cellC.map((c, at) => c - foretoldC[at]!);
		const meanOf = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
		expect(Number(check!.error)).toBeCloseTo(meanOf(errors), 2);
		expect(Number(check!.square)).toBeCloseTo(meanOf(errors.map((error) => error ** 2)), 1);
		// No minute is off by the mean alone, so that one cannot stand for the other.
		expect(Number(check!.square) - Number(check!.error) ** 2).toBeGreaterThan(1);
		expect([
			Number(check!.low) < Number(check!.predicted),
			Number(check!.predicted) < Number(check!.high)
		]).toEqual([true, true]);

		await assessCooler();
		expect(await checksOf(trace.id)).toEqual([check]);
		const { temperatures } = await readAccuracy(crew.engineer);
		expect(temperatures.map(({ kind, all }) => [kind, all.readings])).toEqual([['trace', 1]]);
		const { readings } = await listReadings(crew.manager, askReadings({ kind: 'trace' }));
		expect(readings).toMatchObject([
			{ trace: { id: trace.id, name: 'day.csv', place: 'cells' }, label: null }
		]);
	});

	it('of a day before its mount was entered goes with the newest assessment before it was sent in, and says so', async () => {
		await assessMount(crew.installer, { mountId });
		const newest = await assessCooler();
		const trace = await sendDay(dayText({ date: '2025-02-03' }));
		expect(await checksOf(trace.id)).toMatchObject([
			{ assessment_id: newest.id, is_entered_later: 1, read_on: '2025-02-03' }
		]);
	});

	it('waits for the first assessment of its mount, and for the hour at which it began', async () => {
		const trace = await sendDay();
		expect(await checksOf(trace.id)).toEqual([]);
		expect((await readAccuracy(crew.engineer)).unheldTraces).toBe(1);
		const assessment = await assessMount(crew.installer, { mountId });
		expect(await checksOf(trace.id)).toMatchObject([{ assessment_id: assessment.id }]);
		expect((await readAccuracy(crew.engineer)).unheldTraces).toBe(0);

		const elapsed = dayText().replaceAll(/^2026-02-03 (\d\d):(\d\d):00/gm, (_, h: string, m: string) =>
			String((Number(h) * 60 + Number(m)) * 60)
		);
		const hourless = await sendDay(elapsed.replace('Time', 'Elapsed (s)'));
		expect(hourless.startHour).toBeNull();
		expect(await checksOf(hourless.id)).toEqual([]);
		const legs = hourless.legs.map(({ endS, kind, meanSpeedKmh }) => ({
			endS,
			kind,
			speedKmh: meanSpeedKmh
		}));
		const change = legsChangeSchema.parse({ legs, startHour: 8, version: hourless.version });
		await saveLegs(crew.engineer, hourless.id, change);
		expect(await checksOf(hourless.id)).toMatchObject([{ read_on: today(), left_out: 'no-date' }]);
	});

	it('is held anew when its legs are put right, is forgotten while removed, and is held at the start where it was not', async () => {
		await assessMount(crew.installer, { mountId });
		const trace = await sendDay();
		const [before] = await checksOf(trace.id);
		await saveOneStop(crew.engineer, trace);
		const [stood] = await checksOf(trace.id);
		// An engine that never ran heats nothing.
		expect(Number(stood!.predicted)).toBeLessThan(Number(before!.predicted) - 0.5);

		await removeTrace(crew.engineer, trace.id);
		expect(await checksOf(trace.id)).toEqual([]);
		await completeChecks();
		expect(await checksOf(trace.id)).toEqual([]);
		await restoreTrace(crew.engineer, trace.id);
		const { id: _gone, ...kept } = stood!;
		expect(await checksOf(trace.id)).toMatchObject([kept]);

		await connection().query(`DELETE FROM prediction_checks WHERE trace_id = ${trace.id}`);
		expect((await completeChecks()).traces).toBe(1);
		expect(await checksOf(trace.id)).toMatchObject([kept]);
		expect((await completeChecks()).traces).toBe(0);
	});

	it('counts once when it is sent in twice, and the second one when the first is taken away', async () => {
		await assessMount(crew.installer, { mountId });
		const [first, second] = [await sendDay(), await sendDay()];
		for (const each of [first, second]) await confirmLegs(crew.engineer, each);
		expect(await checksOf(first.id)).toMatchObject([{ left_out: '' }]);
		expect(await checksOf(second.id)).toMatchObject([{ left_out: 'sent-again' }]);
		await removeTrace(crew.engineer, first.id);
		expect(await checksOf(second.id)).toMatchObject([{ left_out: '' }]);
		await restoreTrace(crew.engineer, first.id);
		expect(await checksOf(second.id)).toMatchObject([{ left_out: 'sent-again' }]);
	});

	it('counts at another mount while its own is taken away', async () => {
		await assessMount(crew.installer, { mountId });
		await assessMount(crew.installer, { mountId: otherMountId });
		const first = await sendDay();
		const sent = await sendTrace(crew.engineer, otherMountId, dayText());
		const second = await readAs(crew.engineer, sent);
		for (const each of [first, second]) await confirmLegs(crew.engineer, each);
		expect(await checksOf(second.id)).toMatchObject([{ left_out: 'sent-again' }]);
		await removeMount(crew.installer, mountId);
		expect(await checksOf(first.id)).toEqual([]);
		expect(await checksOf(second.id)).toMatchObject([{ left_out: '' }]);
		await restoreMount(crew.installer, mountId);
		expect(await checksOf(first.id)).toMatchObject([{ left_out: '' }]);
		expect(await checksOf(second.id)).toMatchObject([{ left_out: 'sent-again' }]);
	});

	it('that was made up is held against nothing', async () => {
		await assessMount(crew.installer, { mountId });
		const trace = await sendDay(dayText(), { isSynthetic: true });
		await completeChecks();
		expect(await checksOf(trace.id)).toEqual([]);
		expect(await readAccuracy(crew.engineer)).toMatchObject({ unheldTraces: 0, waitingTraces: 0 });
	});

	it(
		'does not count when it is sent in once more, after a book was fitted to it, nor after one that began from this',
		async () => {
			const { engineer } = crew;
			const { mountId: fittedMountId, traces, texts } = await makeFittable(crew, [1, 2]);
			for (const trace of traces) await confirmLegs(crew.engineer, trace);
			const first = await putFitInForce(traces[0]!);
			await assessMount(crew.installer, { mountId: fittedMountId });
			const sendAgain = async () => readAs(engineer, await sendTrace(engineer, fittedMountId, texts[0]!));
			const again = await sendAgain();
			expect(await checksOf(traces[0]!.id)).toMatchObject([{ left_out: '' }]);
			expect(await checksOf(again.id)).toMatchObject([{ book_id: first.id, left_out: 'fitted-to' }]);
			const { temperatures, leftOut } = await readAccuracy(engineer);
			expect(temperatures.map(({ kind, all }) => [kind, all.readings])).toEqual([['trace', 2]]);
			expect(leftOut).toMatchObject([{ kind: 'trace', why: 'fitted-to', readings: 1 }]);

			const second = await putFitInForce(traces[1]!);
			expect(second.coefficients.flatMap(({ fitId }) => fitId ?? [])).toHaveLength(1);
			await assessMount(crew.installer, { mountId: fittedMountId });
			const later = await sendAgain();
			expect(await checksOf(later.id)).toMatchObject([{ book_id: second.id, left_out: 'fitted-to' }]);
		},
		LONG_MS
	);
});
