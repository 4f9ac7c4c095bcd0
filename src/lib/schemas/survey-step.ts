import { z } from 'zod';
import {
	POSITION_KINDS,
	POSITION_LABELS,
	SURVEY_FIELDS,
	UNKNOWN,
	describeAnswer,
	describeAssumed,
	isAsked,
	questionsFor,
	type DescribedAnswer,
	type PositionKind,
	type SurveyAnswers,
	type SurveyField,
	type SurveyKey,
	type SurveyQuestion
} from '../thermal/survey';
import { surveyAnswersSchema } from './survey';

export {
	POSITION_LABELS,
	SURVEY_FIELDS,
	UNKNOWN,
	describeAnswer,
	describeAssumed,
	isAsked,
	questionsFor,
	type DescribedAnswer,
	type SurveyField,
	type SurveyKey,
	type SurveyQuestion
};

/** The kinds of place, as they are chosen. */
export const POSITION_CHOICES = POSITION_KINDS.map((value) => ({ value, label: POSITION_LABELS[value] }));

/** A question in a word or two, for the button that leads to it: "Next: air path". */
const SHORT_WORDS: Record<string, string> = {
	place: 'place in the bay',
	exhaust: 'exhaust',
	engine: 'engine',
	bonnet: 'bonnet',
	cooling: 'cooling',
	sun: 'sun',
	'box-air': 'air in the box',
	air: 'air path',
	road: 'road below',
	tray: 'tray',
	shield: 'heat shield'
};

/** The page after the last question. */
export const CHECK_STEP = 'check';

export interface SurveyStep {
	question: SurveyQuestion;
	/** Counted from 1. */
	place: number;
	total: number;
	previous: string | null;
	next: string;
	nextWords: string;
}

/** Where a question stands among those that this kind of position is asked; null when it is not one of them. */
export function findStep(kind: PositionKind, id: string): SurveyStep | null {
	const questions = questionsFor(kind);
	const index = questions.findIndex((question) => question.id === id);
	const question = questions[index];
	if (!question) return null;
	const next = questions[index + 1]?.id ?? CHECK_STEP;
	return {
		question,
		place: index + 1,
		total: questions.length,
		previous: questions[index - 1]?.id ?? null,
		next,
		nextWords: SHORT_WORDS[next] ?? 'check your answers'
	};
}

/** Where to go on with a survey: the first question without an answer, or the check of all of them. */
export function firstOpenStep(answers: SurveyAnswers): string {
	const open = questionsFor(answers.positionKind).find((question) =>
		describeAnswer(question, answers).some(({ answer }) => answer === null)
	);
	return open?.id ?? CHECK_STEP;
}

/** What stands in the boxes of a step: text as it was typed, a choice, or "unknown". */
export type StepValues = Record<string, unknown>;

/** A choice decides which of the other fields of its page are asked; a length never does. */
function choicesIn(question: SurveyQuestion, values: StepValues): Partial<SurveyAnswers> {
	const chosen = question.fields
		.filter((key) => SURVEY_FIELDS[key].kind === 'choice')
		.map((key) => [key, surveyAnswersSchema.shape[key].safeParse(values[key]).data]);
	return Object.fromEntries(chosen) as Partial<SurveyAnswers>;
}

/** The fields of a page that make sense with what is chosen on it. */
export function askedFields(question: SurveyQuestion, kind: PositionKind, values: StepValues): SurveyKey[] {
	const answers: SurveyAnswers = { ...choicesIn(question, values), positionKind: kind };
	return question.fields.filter((key) => isAsked(key, answers));
}

function requireAnswer(key: SurveyKey): z.ZodType {
	const { label } = SURVEY_FIELDS[key];
	const answer: z.ZodType = surveyAnswersSchema.shape[key];
	return answer.refine((value) => value !== undefined, {
		error: `${label} is missing.`
	});
}

/** What is typed in a box that is not asked may be anything. */
const passedOver = (key: SurveyKey) => z.string().optional().meta({ label: SURVEY_FIELDS[key].label });

/** The form of one page: each field that is asked needs an answer, and "unknown" is one. */
export function stepSchema(question: SurveyQuestion, kind: PositionKind, values: StepValues) {
	const asked = new Set(askedFields(question, kind, values));
	return z.object(
		Object.fromEntries(
			question.fields.map((key) => [key, asked.has(key) ? requireAnswer(key) : passedOver(key)])
		)
	);
}

/** Puts the answers of one page into the survey; a field that is not asked keeps what it had. */
export function mergeStep(
	survey: SurveyAnswers,
	question: SurveyQuestion,
	answers: StepValues
): SurveyAnswers {
	const kind = survey.positionKind;
	const given = askedFields(question, kind, answers).map((key) => [key, answers[key]]);
	return { ...survey, ...(Object.fromEntries(given) as Partial<SurveyAnswers>) };
}
