export * from './types';
export { SURVEY_FIELDS, type ChoiceField, type ChoiceKey, type LengthField, type LengthKey } from './fields';
export type { SurveyChoice, SurveyField } from './fields';
export { SURVEY_QUESTIONS, isAsked, questionsFor, type SurveyQuestion } from './questions';
export { describeAnswer, describeAssumed, type DescribedAnswer } from './describe-answer';
export { DAY_PLAN_TEMPLATES, type DayPlanTemplate } from './day-plan-templates';
export { viewAreaOf, type HotPatch } from './derive-views';
export { measureBattery, type BatteryShape } from './battery-shape';
export { buildScenario } from './build-scenario';
