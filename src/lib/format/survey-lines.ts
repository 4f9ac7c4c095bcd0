import { describeAnswer, type SurveyQuestion } from '../thermal/survey';
import type { SurveyAnswers } from '../thermal/survey/types';

/** What was answered to a question of the survey; an answer that nobody had says what was taken instead. */
export const listSurveyLines = (
	question: SurveyQuestion,
	survey: SurveyAnswers
): { label: string; value: string }[] =>
	describeAnswer(question, survey).map(({ label, answer, assumed }) => ({
		label,
		value: assumed === null ? (answer ?? '') : `${answer ?? 'Not answered'}: ${assumed} assumed`
	}));
