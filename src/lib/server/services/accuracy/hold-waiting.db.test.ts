import { spawn } from 'node:child_process';
import { beforeEach, describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../../tests/support/assessable-job';
import {
	asksFor,
	checksNow,
	checksOf,
	confirmLegs,
	saveOneStop
} from '../../../../../tests/support/held-traces';
import { makeCrew, useTestDatabase, type Crew } from '../../../../../tests/support/services';
import { dayText, readAs, sendTrace } from '../../../../../tests/support/traces';
import type { HoldsProgress, TraceHold } from '$lib/schemas/accuracy';
import { Trace } from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { answerOnce } from '../../http/idempotency';
import { storage } from '../../storage';
import { assessMount } from '../assessments';
import { binsKeyOf } from '../trace-bins';
import { getTrace, removeTrace } from '../traces';
import { completeChecks } from './complete-checks';
import { finishHolding, shareHeld, startHolding, stopHolding } from './hold-waiting';
import { readAccuracy } from './read-accuracy';
import { holdTraceAsked } from './trace-checks';
import { findTraceHold, followHolds, followTraceHold } from './trace-hold';

useTestDatabase();

const LONG_MS = 120_000;
const isNotOver = () => false;
let crew: Crew;
let mountId: number;

beforeEach(async () => {
	// What other tests asked for is none of these.
	await finishHolding();
	crew = await makeCrew();
	mountId = (await makeAssessableJob(crew.installer)).hot.id;
});

async function sendDay(text = dayText()) {
	return readAs(crew.engineer, await sendTrace(crew.engineer, mountId, text));
}

async function sendPredicted(text = dayText()) {
	await assessMount(crew.installer, { mountId });
	return sendDay(text);
}

const holdOf = (traceId: number) => findTraceHold(crew.engineer, traceId);

describe('what is changed', () => {
	it('is answered before anything is held, and said to be worked out until it is', async () => {
		const trace = await sendPredicted();
		await confirmLegs(crew.engineer, trace);
		expect(await checksNow(trace.id)).toEqual([]);
		expect(await holdOf(trace.id)).toEqual({ state: 'waits', share: 0 });
		expect(await readAccuracy(crew.engineer)).toMatchObject({ waitingTraces: 1, unheldTraces: 0 });

		expect(await finishHolding()).toBe(1);
		expect(await holdOf(trace.id)).toMatchObject({
			...{ state: 'held', reading: { trace: { id: trace.id, place: 'cells' }, leftOut: null } }
		});
		expect(await readAccuracy(crew.engineer)).toMatchObject({ waitingTraces: 0, unheldTraces: 0 });
		expect([await asksFor(trace.id), await finishHolding()]).toEqual([[], 0]);
	});

	it('tells whoever follows it how far it is, to its end', async () => {
		const trace = await sendPredicted();
		const told: (TraceHold | null)[] = [];
		const all: HoldsProgress[] = [];
		const following = Promise.all([
			followTraceHold(crew.engineer, trace.id, (hold) => told.push(hold), isNotOver),
			followHolds(crew.manager, (progress) => all.push(progress), isNotOver)
		]);
		await expect.poll(() => told.length * all.length).toBeGreaterThan(0);
		await finishHolding();
		await following;
		expect([told[0]?.state, told.at(-1)?.state]).toEqual(['waits', 'held']);
		expect([all[0], all.at(-1)]).toEqual([
			{ waiting: 1, share: 0 },
			{ waiting: 0, share: 1 }
		]);
	});

	it('that nobody follows any more is told no more', async () => {
		const trace = await sendPredicted();
		const told: unknown[] = [];
		await followTraceHold(
			crew.engineer,
			trace.id,
			(hold) => told.push(hold),
			() => true
		);
		expect(told).toEqual([{ state: 'waits', share: 0 }]);
		await finishHolding();
	});
});

describe('why nothing is held', () => {
	it('is said: no assessment, no hour, nothing measured of the battery', async () => {
		const unforetold = await sendDay();
		await finishHolding();
		expect(await holdOf(unforetold.id)).toEqual({ state: 'none', why: 'no-assessment' });
		const airAlone = dayText().replaceAll('Cell (°C)', 'Bay air (°C)');
		const aside = await sendPredicted(airAlone);
		const elapsed = dayText().replaceAll(/^2026-02-03 (\d\d):(\d\d):00/gm, (_, h: string, m: string) =>
			String((Number(h) * 60 + Number(m)) * 60)
		);
		const hourless = await sendDay(elapsed.replace('Time', 'Elapsed (s)'));
		await finishHolding();
		expect(await holdOf(aside.id)).toEqual({ state: 'none', why: 'no-run' });
		expect(await holdOf(hourless.id)).toEqual({ state: 'none', why: 'no-hour' });
		expect(await holdOf(unforetold.id)).toMatchObject({ state: 'held' });
	});

	it('is told to nobody of another workshop', async () => {
		const trace = await sendPredicted();
		const other = await makeCrew();
		await expect(findTraceHold(other.engineer, trace.id)).rejects.toMatchObject({ code: 'not_found' });
		await expect(findTraceHold(crew.installer, trace.id)).rejects.toMatchObject({ code: 'not_allowed' });
		expect((await readAccuracy(other.engineer)).waitingTraces).toBe(0);
		await finishHolding();
	});
});

describe('a change inside a transaction of its caller', () => {
	it('is held once that is kept, and not before', async () => {
		const trace = await sendPredicted();
		await finishHolding();
		const asked = { personId: crew.engineer.id, key: 'legs', request: 'legs' };
		startHolding();
		try {
			await answerOnce(asked, async () => {
				await saveOneStop(crew.engineer, trace);
				// Forgotten in here, and nobody at work on it: it is not kept yet.
				expect([await checksNow(trace.id), (await asksFor(trace.id)).length]).toEqual([[], 1]);
				return { status: 200, body: '{}' };
			});
			await expect.poll(() => asksFor(trace.id), { timeout: LONG_MS }).toEqual([]);
		} finally {
			await stopHolding();
		}
		expect(await checksNow(trace.id)).toMatchObject([{ kind: 'trace' }]);
	});

	it('that is given up leaves what was held, and asks for nothing', async () => {
		const trace = await sendPredicted();
		const before = await checksOf(trace.id);
		expect(before).toHaveLength(1);
		const given = inTransaction(async () => {
			await saveOneStop(crew.engineer, trace);
			throw new Error('given up');
		});
		await expect(given).rejects.toThrow('given up');
		expect([await checksNow(trace.id), await asksFor(trace.id)]).toEqual([before, []]);
	});
});

describe('what was asked for', () => {
	it(
		'outlasts a process that is killed amid it, and is held once by the next',
		async () => {
			const trace = await sendPredicted(dayText({ minutes: 1440 }));
			const child = spawn(
				process.execPath,
				['--import', 'tsx', 'tests/support/hold-process.ts', String(trace.id)],
				{ stdio: 'ignore' }
			);
			const signal = await new Promise((resolve) => child.once('exit', (_code, by) => resolve(by)));
			expect(signal).toBe('SIGKILL');
			expect([await checksNow(trace.id), await holdOf(trace.id)]).toMatchObject([[], { state: 'waits' }]);
			// As at a start of the application.
			expect((await completeChecks()).traces).toBe(1);
			expect(await checksOf(trace.id)).toHaveLength(1);
		},
		LONG_MS
	);

	it('is broken off when the application stops, and begins again', async () => {
		const trace = await sendPredicted(dayText({ minutes: 1440 }));
		startHolding();
		while (shareHeld(trace.id) === 0) await new Promise((resolve) => setImmediate(resolve));
		await stopHolding();
		expect([await checksNow(trace.id), (await asksFor(trace.id)).length]).toEqual([[], 1]);
		expect(await checksOf(trace.id)).toHaveLength(1);
	});

	it('is kept by one alone when two are at it', async () => {
		const trace = await sendPredicted();
		const askIds = await asksFor(trace.id);
		const kept = await Promise.all([holdTraceAsked(trace.id, askIds), holdTraceAsked(trace.id, askIds)]);
		expect(kept.sort()).toEqual([false, true]);
		expect([(await checksNow(trace.id)).length, await asksFor(trace.id)]).toEqual([1, []]);
	});

	it('does not stand for what was asked for meanwhile', async () => {
		const trace = await sendPredicted(dayText({ minutes: 1440 }));
		const [driven] = await checksOf(trace.id);
		const { version } = await getTrace(crew.engineer, trace.id);
		await confirmLegs(crew.engineer, { ...trace, version });
		const now = await getTrace(crew.engineer, trace.id);
		let saving: Promise<void> | null = null;
		await holdTraceAsked(trace.id, await asksFor(trace.id), () => {
			saving ??= saveOneStop(crew.engineer, now);
		});
		await saving;
		const [stood, ...others] = await checksOf(trace.id);
		expect(others).toEqual([]);
		// An engine that never ran heats nothing.
		expect(Number(stood!.predicted)).toBeLessThan(Number(driven!.predicted) - 0.5);
	});

	it('of a trace that is gone meanwhile is let go', async () => {
		const trace = await sendPredicted();
		await removeTrace(crew.engineer, trace.id);
		expect([await finishHolding(), await asksFor(trace.id), await checksNow(trace.id)]).toEqual([0, [], []]);
	});

	it('waits while it cannot be done, others are held, and it is tried again', async () => {
		const [broken, whole] = [await sendPredicted(), await sendDay(dayText({ minutes: 300 }))];
		const key = binsKeyOf((await Trace.findByPk(broken.id))!.contentId);
		const bins = await storage().read(key);
		await storage().remove(key);
		expect(await finishHolding()).toBe(1);
		expect([await holdOf(broken.id), await holdOf(whole.id)]).toMatchObject([
			{ state: 'waits' },
			{ state: 'held' }
		]);
		await storage().put(key, Uint8Array.from(bins!));
		expect(await finishHolding()).toBe(1);
		expect(await holdOf(broken.id)).toMatchObject({ state: 'held' });
	});
});
