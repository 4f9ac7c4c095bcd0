import type { SurveyInputs } from '../thermal/survey';

/** What a live curve needs besides the survey and the day: both change under the person's hand. */
export type PreviewBase = Omit<SurveyInputs, 'survey' | 'dayPlan'>;
