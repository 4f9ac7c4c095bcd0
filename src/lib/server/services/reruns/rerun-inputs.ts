import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import { DAYS_DRAWN } from '$lib/schemas/reruns';
import { parseScenario } from '$lib/thermal';
import { watchUseLimit } from '$lib/thermal/assess';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import { drawCutOuts } from '$lib/thermal/uncertainty';
import { AppError } from '../../errors';
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

/** A reason is for people; a fault, where it was ours, for the log. */
export type RerunAnswer = { outcome: RerunOutcome } | { reason: string; fault?: string };

const OUR_FAULT =
	'It could not be assessed again, through a fault of ours. What holds of it is what was assessed before.';

function drawDays({ scenario, battery }: AssessmentInputs, seed: number): number {
	const watched = watchUseLimit(parseScenario(scenario), heatLimitsOf(battery));
	return drawCutOuts(watched, { samples: DAYS_DRAWN, seed }).share;
}

/** What is said of an error: its own words where they were written for people, else ours. */
function describeFailure(error: unknown): { reason: string; fault?: string } {
	if (error instanceof AppError) return { reason: error.message };
	return {
		reason: OUR_FAULT,
		fault: error instanceof Error ? (error.stack ?? error.message) : String(error)
	};
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
		return describeFailure(error);
	}
}
