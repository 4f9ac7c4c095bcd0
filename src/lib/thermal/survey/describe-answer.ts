import { SURVEY_FIELDS, type SurveyField } from './fields';
import { isAsked, type SurveyQuestion } from './questions';
import { UNKNOWN, type SurveyAnswers, type SurveyKey } from './types';

/** One answer as it stands on the page that checks the answers. */
export interface DescribedAnswer {
	key: SurveyKey;
	label: string;
	/** Null: not yet answered. */
	answer: string | null;
	/** Said where the answer is not known or not yet given. */
	assumed: string | null;
}

/**
 * A field's cautious value in words.
 *
 * @param field of the survey
 * @returns its label, or the length with its unit
 * Validity: every field.
 * Source: the field says what is assumed.
 * @example
 * describeAssumed(SURVEY_FIELDS.trayMaterial); // 'Steel'
 */
export function describeAssumed(field: SurveyField): string {
	if (field.kind === 'choice') return describeValue(field, field.assumed);
	return field.assumedMm === null ? (field.assumedWords ?? '') : describeValue(field, field.assumedMm);
}

function describeValue(field: SurveyField, value: string | number): string {
	if (field.kind === 'length') return `${value}\u202Fmm`;
	return field.choices.find((choice) => choice.value === value)?.label ?? String(value);
}

function describeField(key: SurveyKey, answers: SurveyAnswers): DescribedAnswer {
	const field: SurveyField = SURVEY_FIELDS[key];
	const given = answers[key];
	const label = field.label;
	if (given === undefined) return { key, label, answer: null, assumed: describeAssumed(field) };
	if (given === UNKNOWN) return { key, label, answer: 'Not known', assumed: describeAssumed(field) };
	return { key, label, answer: describeValue(field, given), assumed: null };
}

/**
 * What was answered to a question, field by field, without those that the other answers make needless.
 *
 * @param question of the survey
 * @param answers of one position
 * @returns label and answer of each field, and what is assumed where it is not known
 * Validity: a question that the position gets.
 * Source: our own.
 * @example
 * describeAnswer(questionsFor('cabin')[0]!, { positionKind: 'cabin', enclosureCooling: 'cooled' })
 * // [{ key: 'enclosureCooling', label: 'Air conditioning', answer: 'Runs while driving', assumed: null }]
 */
export function describeAnswer(question: SurveyQuestion, answers: SurveyAnswers): DescribedAnswer[] {
	return question.fields.filter((key) => isAsked(key, answers)).map((key) => describeField(key, answers));
}
