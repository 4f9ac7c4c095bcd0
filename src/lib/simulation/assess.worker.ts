import type { AssessRequest, AssessResponse, LiveSpread } from './messages';
import { runAssessment } from './run-assessment';
import { runSpread } from './run-spread';

/** So long it works before it looks whether something newer was asked. */
const SLICE_MS = 8;

let newest = 0;

const send = (response: AssessResponse): void => postMessage(response);
const lookUp = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));

/** Draws around the answer, until the end or until something newer is asked. */
async function spread(id: number, work: Generator<number, LiveSpread>): Promise<void> {
	let until = performance.now() + SLICE_MS;
	while (newest === id) {
		const step = work.next();
		if (step.done) {
			send({ id, spread: step.value });
			return;
		}
		if (performance.now() < until) continue;
		await lookUp();
		until = performance.now() + SLICE_MS;
	}
}

addEventListener('message', ({ data: { id, inputs } }: MessageEvent<AssessRequest>) => {
	newest = id;
	const answer = runAssessment(inputs);
	send({ id, answer });
	// A draw that cannot be run leaves the answer without a band; the answer itself stands.
	if (answer.status === 'done') spread(id, runSpread(inputs)).catch(() => undefined);
});
