import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { SurveyInputs } from '../thermal/survey/types';
import { createAssessor, type AssessWorker } from './client';
import type { AssessRequest, AssessResponse, LiveSpread, RunAnswer } from './messages';

const inputs = (altitudeM: number) => ({ altitudeM }) as SurveyInputs;
const answer = (reason: string): RunAnswer => ({ status: 'failed', reason });

/** A worker that answers when the test says so. */
class FakeWorker implements AssessWorker {
	static opened: FakeWorker[] = [];
	onmessage: AssessWorker['onmessage'] = null;
	onerror: AssessWorker['onerror'] = null;
	requests: AssessRequest[] = [];
	terminated = false;

	constructor() {
		FakeWorker.opened.push(this);
	}
	postMessage(request: AssessRequest) {
		this.requests.push(request);
	}
	terminate() {
		this.terminated = true;
	}
	spread(index: number, daysOfTwenty: number) {
		const spread = { daysOfTwenty } as LiveSpread;
		this.onmessage?.({
			data: { id: this.requests[index]?.id ?? -1, spread }
		} as MessageEvent<AssessResponse>);
	}
	answer(index: number, reason: string) {
		const id = this.requests[index]?.id ?? -1;
		this.onmessage?.({ data: { id, answer: answer(reason) } } as MessageEvent<AssessResponse>);
	}
}

const worker = (index: number) => FakeWorker.opened[index] as FakeWorker;
const open = (maxRunMs = 1000) => createAssessor({ createWorker: () => new FakeWorker(), maxRunMs });

beforeEach(() => {
	FakeWorker.opened = [];
	vi.useFakeTimers();
});
afterEach(() => {
	vi.useRealTimers();
});

describe('an assessor', () => {
	it('sends the inputs to its worker and hands back the answer', async () => {
		const outcome = open().assess(inputs(1));
		expect(worker(0).requests.map((request) => request.inputs.altitudeM)).toEqual([1]);
		worker(0).answer(0, 'first');
		expect(await outcome).toEqual(answer('first'));
	});

	it('opens no worker before the first run, and one for all of them', async () => {
		const assessor = open();
		expect(FakeWorker.opened).toHaveLength(0);
		const first = assessor.assess(inputs(1));
		worker(0).answer(0, 'first');
		await first;
		void assessor.assess(inputs(2));
		expect(FakeWorker.opened).toHaveLength(1);
	});

	it('keeps only the newest of those that wait, and drops the one that ran meanwhile', async () => {
		const assessor = open();
		const [first, second, third] = [1, 2, 3].map((n) => assessor.assess(inputs(n)));
		expect(await second).toEqual({ status: 'dropped' });
		worker(0).answer(0, 'first');
		expect(await first).toEqual({ status: 'dropped' });
		expect(worker(0).requests.map((request) => request.inputs.altitudeM)).toEqual([1, 3]);
		worker(0).answer(1, 'third');
		expect(await third).toEqual(answer('third'));
	});

	it('stops a run that takes too long, says so, and works on with a new worker', async () => {
		const assessor = open(500);
		const slow = assessor.assess(inputs(1));
		await vi.advanceTimersByTimeAsync(499);
		expect(worker(0).terminated).toBe(false);
		await vi.advanceTimersByTimeAsync(1);
		expect(worker(0).terminated).toBe(true);
		expect(await slow).toMatchObject({ status: 'failed', reason: expect.stringContaining('too long') });
		const next = assessor.assess(inputs(2));
		worker(1).answer(0, 'next');
		expect(await next).toEqual(answer('next'));
	});

	it('runs what was waiting when the run before it took too long', async () => {
		const assessor = open(500);
		const slow = assessor.assess(inputs(1));
		const waiting = assessor.assess(inputs(2));
		await vi.advanceTimersByTimeAsync(500);
		expect(await slow).toEqual({ status: 'dropped' });
		worker(1).answer(0, 'waited');
		expect(await waiting).toEqual(answer('waited'));
	});

	it('does not stop a run that was answered in time', async () => {
		const assessor = open(500);
		const first = assessor.assess(inputs(1));
		worker(0).answer(0, 'first');
		await first;
		await vi.advanceTimersByTimeAsync(1000);
		expect(worker(0).terminated).toBe(false);
	});

	it('says so when the worker breaks down, and opens another for the next run', async () => {
		const assessor = open();
		const broken = assessor.assess(inputs(1));
		worker(0).onerror?.({} as ErrorEvent);
		expect(await broken).toMatchObject({ status: 'failed', reason: expect.stringContaining('broke down') });
		void assessor.assess(inputs(2));
		expect(FakeWorker.opened).toHaveLength(2);
	});

	it('drops the running and the waiting run when cancelled, and hears no late answer', async () => {
		const assessor = open();
		const [running, waiting] = [assessor.assess(inputs(1)), assessor.assess(inputs(2))];
		assessor.cancel();
		expect(await Promise.all([running, waiting])).toEqual([{ status: 'dropped' }, { status: 'dropped' }]);
		const next = assessor.assess(inputs(3));
		worker(0).answer(0, 'late');
		worker(1).answer(0, 'next');
		expect(await next).toEqual(answer('next'));
	});

	it('ends its worker when disposed', async () => {
		const assessor = open();
		const running = assessor.assess(inputs(1));
		assessor.dispose();
		expect(worker(0).terminated).toBe(true);
		expect(await running).toEqual({ status: 'dropped' });
	});

	it('hands on the spread around the newest answer, and none that came too late', async () => {
		const heard: number[] = [];
		const onSpread = ({ daysOfTwenty }: LiveSpread) => heard.push(daysOfTwenty);
		const assessor = createAssessor({ createWorker: () => new FakeWorker(), onSpread });
		const first = assessor.assess(inputs(1));
		worker(0).answer(0, 'first');
		await first;
		worker(0).spread(0, 3);
		void assessor.assess(inputs(2));
		worker(0).spread(0, 4);
		expect(heard).toEqual([3]);
	});

	it('runs in the page where there are no workers', async () => {
		const runInPage = vi.fn((given: SurveyInputs) => Promise.resolve(answer(`in page ${given.altitudeM}`)));
		const assessor = createAssessor({ createWorker: () => null, runInPage });
		expect(await assessor.assess(inputs(4))).toEqual(answer('in page 4'));
	});

	it('says so when the run in the page breaks down', async () => {
		const runInPage = () => Promise.reject(new Error('no'));
		const assessor = createAssessor({ createWorker: () => null, runInPage });
		expect(await assessor.assess(inputs(5))).toMatchObject({ status: 'failed' });
	});
});
