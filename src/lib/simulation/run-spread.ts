import { watchUseLimit } from '../thermal/assess';
import { heatLimitsOf } from '../thermal/chemistries';
import { buildScenario } from '../thermal/survey';
import type { SurveyInputs } from '../thermal/survey/types';
import { spreadDay } from '../thermal/uncertainty';
import { parseScenario } from '../thermal/vehicle/parse-scenario';
import type { LiveSpread } from './messages';

/** Few enough to be there before a hand has left the control, enough for a steady band. */
const SAMPLES = 256;
/** The same draws at each change, so that the band moves with the answer and not with chance. */
const SEED = 1;

/** Draws days around what is surveyed; yields after each, so that whoever drives it can look whether it is still wanted. */
export function* runSpread(inputs: SurveyInputs): Generator<number, LiveSpread> {
	const surveyed = parseScenario(buildScenario(inputs).scenario);
	const scenario = watchUseLimit(surveyed, heatLimitsOf(inputs.battery));
	const { samples, cutOutShare, daysOfTwenty, band } = yield* spreadDay(scenario, {
		samples: SAMPLES,
		seed: SEED
	});
	return { samples, cutOutShare, daysOfTwenty, band };
}
