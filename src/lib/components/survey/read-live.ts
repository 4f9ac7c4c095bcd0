import { parseMeasure } from '$lib/format/units';
import type { SurveyAnswers } from '$lib/schemas/survey';
import { surveyAnswersSchema } from '$lib/schemas/survey';
import {
	SURVEY_FIELDS,
	UNKNOWN,
	mergeStep,
	type SurveyKey,
	type SurveyQuestion
} from '$lib/schemas/survey-step';

/** A length that stands in its box and cannot be read, or lies outside its limits. */
const isUnread = (key: SurveyKey, text: string): boolean =>
	SURVEY_FIELDS[key].kind === 'length' && text.trim() !== '' && readAnswer(key, text) === undefined;

/** One answer as it stands in its box; undefined while it cannot be read. */
function readAnswer(key: SurveyKey, text: string): unknown {
	const isLength = SURVEY_FIELDS[key].kind === 'length';
	const value = isLength && text !== UNKNOWN ? (parseMeasure(text, 'mm') ?? undefined) : text;
	return surveyAnswersSchema.shape[key].safeParse(value).data;
}

/**
 * The survey as it would be with what stands in the boxes of one page: what the live curve is drawn from. Null while one of
 * them holds what cannot be: a curve of something else would stand in for it.
 */
export function readLive(
	survey: SurveyAnswers,
	question: SurveyQuestion,
	values: Record<string, string>
): SurveyAnswers | null {
	if (question.fields.some((key) => isUnread(key, values[key] ?? ''))) return null;
	const read = question.fields.map((key) => [key, readAnswer(key, values[key] ?? '')]);
	return mergeStep(survey, question, Object.fromEntries(read) as Record<string, unknown>);
}
