import { assessScenario } from '../thermal/assess';
import { heatLimitsOf } from '../thermal/chemistries';
import { ScenarioError } from '../thermal/errors';
import { buildScenario } from '../thermal/survey';
import type { SurveyInputs } from '../thermal/survey/types';
import type { RunAnswer } from './messages';

/** From tape-measure answers to an assessment; what cannot be run comes back as a value. */
export function runAssessment(inputs: SurveyInputs): RunAnswer {
	try {
		const { scenario } = buildScenario(inputs);
		return assessScenario(scenario, {
			legKinds: inputs.dayPlan.legs.map(({ kind }) => kind),
			heatLimits: heatLimitsOf(inputs.battery)
		});
	} catch (error) {
		if (error instanceof ScenarioError)
			return { status: 'refused', path: error.path, message: error.message };
		throw error;
	}
}
