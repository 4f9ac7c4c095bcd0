import type { SurveyInputs } from '../thermal/survey/types';
import type { AssessOutcome, AssessRequest, AssessResponse, LiveSpread, RunAnswer } from './messages';

/** As much of a worker as is used here. */
export interface AssessWorker {
	postMessage(request: AssessRequest): void;
	terminate(): void;
	onmessage: ((event: MessageEvent<AssessResponse>) => void) | null;
	onerror: ((event: ErrorEvent) => void) | null;
}

export interface AssessorSettings {
	/** Null where the browser has no workers: then the run is done in the page. */
	createWorker?: () => AssessWorker | null;
	runInPage?: (inputs: SurveyInputs) => Promise<RunAnswer>;
	/** Longer than any sound run takes on a slow phone. */
	maxRunMs?: number;
	/** Hears of the spread around the answer that was handed back last. */
	onSpread?: (spread: LiveSpread) => void;
}

export interface Assessor {
	/** Resolves with the answer, or "dropped" once a newer call, `cancel` or `dispose` took its place. */
	assess(inputs: SurveyInputs): Promise<AssessOutcome>;
	cancel(): void;
	dispose(): void;
}

interface Run {
	id: number;
	inputs: SurveyInputs;
	settle: (outcome: AssessOutcome) => void;
}

const MAX_RUN_MS = 8_000;
const TOOK_TOO_LONG = 'The calculation took too long and was stopped. Change something to try again.';
const BROKE_DOWN = 'The calculation broke down. Change something to try again.';

/** Runs assessments beside the page. One at a time: only the newest waits, the rest are dropped. */
export function createAssessor(settings: AssessorSettings = {}): Assessor {
	const { createWorker = startWorker, runInPage = importAndRun, maxRunMs = MAX_RUN_MS, onSpread } = settings;
	let worker: AssessWorker | null = null;
	let running: Run | null = null;
	let waiting: Run | null = null;
	let timer: ReturnType<typeof setTimeout> | undefined;
	let lastId = 0;

	function start(run: Run) {
		running = run;
		worker ??= openWorker();
		if (!worker) {
			runInPage(run.inputs).then(
				(answer) => finish(run.id, answer),
				() => finish(run.id, { status: 'failed', reason: BROKE_DOWN })
			);
			return;
		}
		timer = setTimeout(() => breakOff(TOOK_TOO_LONG), maxRunMs);
		worker.postMessage({ id: run.id, inputs: run.inputs });
	}

	function openWorker(): AssessWorker | null {
		const opened = createWorker();
		if (!opened) return null;
		opened.onmessage = ({ data }) => {
			if ('answer' in data) finish(data.id, data.answer);
			else if (data.id === lastId) onSpread?.(data.spread);
		};
		opened.onerror = () => breakOff(BROKE_DOWN);
		return opened;
	}

	/** An answer to a run that is no longer the running one is not listened to. */
	function finish(id: number, outcome: AssessOutcome) {
		if (running?.id !== id) return;
		clearTimeout(timer);
		const done = running;
		running = null;
		done.settle(waiting ? { status: 'dropped' } : outcome);
		if (!waiting) return;
		const next = waiting;
		waiting = null;
		start(next);
	}

	function breakOff(reason: string) {
		closeWorker();
		if (running) finish(running.id, { status: 'failed', reason });
	}

	function closeWorker() {
		clearTimeout(timer);
		worker?.terminate();
		worker = null;
	}

	function cancel() {
		waiting?.settle({ status: 'dropped' });
		waiting = null;
		if (!running) return;
		const { settle } = running;
		running = null;
		closeWorker();
		settle({ status: 'dropped' });
	}

	return {
		assess: (inputs) =>
			new Promise((settle) => {
				const run: Run = { id: ++lastId, inputs, settle };
				waiting?.settle({ status: 'dropped' });
				waiting = null;
				if (running) waiting = run;
				else start(run);
			}),
		cancel,
		dispose() {
			cancel();
			closeWorker();
		}
	};
}

function startWorker(): AssessWorker | null {
	if (typeof Worker === 'undefined') return null;
	return new Worker(new URL('./assess.worker.ts', import.meta.url), { type: 'module' });
}

async function importAndRun(inputs: SurveyInputs): Promise<RunAnswer> {
	const { runAssessment } = await import('./run-assessment');
	return runAssessment(inputs);
}
