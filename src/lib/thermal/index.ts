/** The engine's edge: what pages, services and programs may use. */
export { ScenarioError, SCENARIO_ERROR_CODES, showValue } from './errors';
export type { ScenarioErrorCode, ScenarioFault } from './errors';
export * from './types';
export { ambientTempC, sunWPerM2 } from './vehicle/climate';
export { heatFlowsAt } from './vehicle/heat-flows';
export type { HeatFlow } from './vehicle/heat-flows';
export type { Contradiction } from './vehicle/check-consistency';
export { defaultScenario, describeRange, findContradictions, parseScenario } from './vehicle/parse-scenario';
export {
	COEFFICIENT_GROUPS,
	coefficientDefaults,
	FIELD_GROUPS,
	LONGEST_PLAN_MINUTES,
	MOST_LEGS,
	SCENARIO_FIELDS
} from './vehicle/scenario-fields';
export type {
	ChoiceField,
	CoefficientGroup,
	FieldGroup,
	FlagField,
	NumberField,
	ScenarioField
} from './vehicle/scenario-fields';
export { ROLLING_RESISTANCE } from './vehicle/leg-drive';
export { runScenario, simulateScenario } from './vehicle/simulate';
export { ENGINE_VERSION } from './version';
