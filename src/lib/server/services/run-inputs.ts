import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import { assessScenario } from '$lib/thermal/assess';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import { buildScenario } from '$lib/thermal/survey';
import { AppError } from '../errors';
import { canonicalJson, sha256 } from '../hash';
import { asInputError } from './input-error';

/** What goes into an assessment before it is turned into a scenario. */
export type MeasuredInputs = Omit<AssessmentInputs, 'scenario' | 'derivations' | 'assumptions'>;

/** The scenario that stored inputs give: what an assessment ran, made again. */
export function scenarioOf(
	measured: MeasuredInputs
): Pick<AssessmentInputs, 'scenario' | 'derivations' | 'assumptions'> {
	const { vehicle, battery, mount, dayPlan, hotDay, place, book } = measured;
	return buildScenario({
		...{ vehicle, battery, dayPlan, hotDay },
		survey: mount.survey,
		altitudeM: place.altitudeM,
		coefficients: book.coefficients
	});
}

/** The same with its scenario, or the error that says what is wrong with it. */
export function completeInputs(measured: MeasuredInputs): AssessmentInputs {
	try {
		return { ...measured, ...scenarioOf(measured) };
	} catch (error) {
		throw asInputError(error);
	}
}

/** Runs what went in; a run that cannot be finished is an error, so that nothing of it is stored. */
export function runInputs({ scenario, dayPlan, battery }: AssessmentInputs): AssessmentResult {
	try {
		const answer = assessScenario(scenario, {
			legKinds: dayPlan.legs.map(({ kind }) => kind),
			heatLimits: heatLimitsOf(battery)
		});
		if (answer.status === 'done') return answer;
		throw new AppError(
			'simulation_failed',
			`The run could not be finished, and nothing was stored. ${answer.reason}`
		);
	} catch (error) {
		throw asInputError(error);
	}
}

export const hashInputs = (inputs: AssessmentInputs): string => sha256(canonicalJson(inputs));

/** What lists filter and sort by stands in columns of its own. */
export function columnsOf(result: AssessmentResult) {
	const { verdict, headroomK, peakCellsC, peakAtHour, cutAtHour, resetAtHour } = result;
	const { darkHours, chargeMissedAh, engineVersion } = result;
	return {
		...{ verdict, headroomK, peakCellsC, peakAtHour, cutAtHour, resetAtHour },
		...{ darkHours, chargeMissedAh, engineVersion }
	};
}
