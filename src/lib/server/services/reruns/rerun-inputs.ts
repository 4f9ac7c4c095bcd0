import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import { DAYS_DRAWN } from '$lib/schemas/reruns';
import { parseScenario } from '$lib/thermal';
import { watchUseLimit } from '$lib/thermal/assess';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import { drawCutOuts } from '$lib/thermal/uncertainty';
import { completeInputs, hashInputs, runInputs } from '../run-inputs';

export interface RerunTask {
	/** Of the item, and the seed of what is drawn for it. */
	id: number;
	inputs: AssessmentInputs;
	book: AssessmentInputs['book'];
}

export interface RerunOutcome {
	inputs: AssessmentInputs;
	inputsSha256: string;
	result: AssessmentResult;
	/** Of days like this one. */
	cutOutShare: number;
}

export type RerunAnswer = { outcome: RerunOutcome } | { reason: string };

function drawDays({ scenario, battery }: AssessmentInputs, seed: number): number {
	const watched = watchUseLimit(parseScenario(scenario), heatLimitsOf(battery));
	return drawCutOuts(watched, { samples: DAYS_DRAWN, seed }).share;
}

/**
 * An assessment made again from what it was made with, on the engine of today and another book. Pure, so that a thread of
 * its own can do it.
 */
export function rerunInputs({ id, inputs: then, book }: RerunTask): RerunAnswer {
	try {
		const { scenario: _scenario, derivations: _derivations, assumptions: _assumptions, ...measured } = then;
		const inputs = completeInputs({ ...measured, book });
		const result = runInputs(inputs);
		return {
			outcome: { inputs, inputsSha256: hashInputs(inputs), result, cutOutShare: drawDays(inputs, id) }
		};
	} catch (error) {
		return { reason: error instanceof Error ? error.message : String(error) };
	}
}
