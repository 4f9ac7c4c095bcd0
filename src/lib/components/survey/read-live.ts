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

/** One answer as it stands in its box; undefined while it cannot be read. */
function readAnswer(key: SurveyKey, text: string): unknown {
	const isLength = SURVEY_FIELDS[key].kind === 'length';
	const value = isLength && text !== UNKNOWN ? (parseMeasure(text, 'mm') ?? undefined) : text;
	return surveyAnswersSchema.shape[key].safeParse(value).data;
}

/** The survey as it would be with what stands in the boxes of one page: what the live curve is drawn from. */
export function readLive(
	survey: SurveyAnswers,
	question: SurveyQuestion,
	values: Record<string, string>
): SurveyAnswers {
	const read = question.fields.map((key) => [key, readAnswer(key, values[key] ?? '')]);
	return mergeStep(survey, question, Object.fromEntries(read) as Record<string, unknown>);
}
