import type { CoefficientBook, PositionKind, SurveyAnswers, SurveyInputs } from '../thermal/survey';

/** What a live curve needs besides the survey and the day: both change under the person's hand. */
export type PreviewBase = Omit<SurveyInputs, 'survey' | 'dayPlan' | 'coefficients'> & {
	/** Of the book that holds for each kind of position. */
	coefficientsAt: Record<PositionKind, CoefficientBook>;
};

/** What a live curve is made from. */
export function previewInputs(
	{ coefficientsAt, ...base }: PreviewBase,
	dayPlan: SurveyInputs['dayPlan'],
	survey: SurveyAnswers
): SurveyInputs {
	return { ...base, coefficients: coefficientsAt[survey.positionKind], dayPlan, survey };
}
