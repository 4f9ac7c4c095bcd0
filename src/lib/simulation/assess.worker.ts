import type { AssessRequest, AssessResponse } from './messages';
import { runAssessment } from './run-assessment';

addEventListener('message', ({ data }: MessageEvent<AssessRequest>) => {
	const response: AssessResponse = { id: data.id, answer: runAssessment(data.inputs) };
	postMessage(response);
});
