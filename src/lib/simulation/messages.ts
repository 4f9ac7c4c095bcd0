import type { Assessment } from '../thermal/assess/types';
import type { DaySpread } from '../thermal/uncertainty/spread-day';
import type { SurveyInputs } from '../thermal/survey/types';

/** To the worker: one run. */
export interface AssessRequest {
	id: number;
	inputs: SurveyInputs;
}

/** Inputs that cannot be run: where, and what would have been right. */
export interface RefusedRun {
	status: 'refused';
	path: string;
	message: string;
}

/** A run that nobody waits for any more, because a newer one took its place. */
export interface DroppedRun {
	status: 'dropped';
}

export type RunAnswer = Assessment | RefusedRun;
export type AssessOutcome = RunAnswer | DroppedRun;

/** How far the day may go otherwise, from draws of what is not known. */
export type LiveSpread = Pick<DaySpread, 'samples' | 'cutOutShare' | 'daysOfTwenty' | 'band'>;

/** From the worker: the answer to the run of that id, and after it what the draws around it came to. */
export type AssessResponse = { id: number; answer: RunAnswer } | { id: number; spread: LiveSpread };
