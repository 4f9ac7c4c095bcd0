import { describeAssumed } from './describe-answer';
import { SURVEY_FIELDS, type ChoiceKey, type LengthKey, type SurveyField } from './fields';
import { isAsked, questionsFor, type SurveyQuestion } from './questions';
import { UNKNOWN, type SurveyAnswers, type SurveyKey } from './types';

type Choice<K extends ChoiceKey> = (typeof SURVEY_FIELDS)[K]['assumed'];

/** Reads a survey: what was answered, or the cautious value. */
export class AnswerReader {
	constructor(readonly survey: SurveyAnswers) {}

	/** The choice that was made, or the cautious one. */
	choose<K extends ChoiceKey>(key: K): Choice<K> {
		const given = this.survey[key];
		return given === undefined || given === UNKNOWN ? SURVEY_FIELDS[key].assumed : (given as Choice<K>);
	}

	/** The reading in metres, or the cautious one; `ownM` where that comes from the battery. */
	lengthM(key: LengthKey, ownM = 0): number {
		const given = this.survey[key];
		if (typeof given === 'number') return given / 1000;
		const { assumedMm } = SURVEY_FIELDS[key];
		return assumedMm === null ? ownM : assumedMm / 1000;
	}
}

function isMissing(key: SurveyKey, answers: SurveyAnswers): boolean {
	return answers[key] === undefined || answers[key] === UNKNOWN;
}

function assumeField(key: SurveyKey, answers: SurveyAnswers): string {
	const field: SurveyField = SURVEY_FIELDS[key];
	const what = answers[key] === UNKNOWN ? 'not known' : 'not yet answered';
	return `${field.label}: ${what}. Assumed: ${describeAssumed(field).replace(/\.$/, '')}.`;
}

function assumeQuestion(question: SurveyQuestion, answers: SurveyAnswers): string[] {
	const asked = question.fields.filter((key) => isAsked(key, answers));
	const missing = asked.filter((key) => isMissing(key, answers));
	if (missing.length === 0) return [];
	if (missing.length < asked.length || asked.length === 1) {
		return missing.map((key) => assumeField(key, answers));
	}
	const what = asked.some((key) => answers[key] === UNKNOWN) ? 'Not known' : 'Not yet answered';
	return [`${question.title} ${what}. Assumed: ${question.ifUnknown}`];
}

/**
 * One sentence for each answer that is missing or not known; one for a whole question without any.
 *
 * @param answers of one position
 * @returns the sentences, in the order of the questions
 * Validity: every position; what the other answers make needless is not missed.
 * Source: the questions say what is assumed.
 * @example
 * listAssumptions({ positionKind: 'cabin' }).length; // 2
 */
export function listAssumptions(answers: SurveyAnswers): string[] {
	return questionsFor(answers.positionKind).flatMap((question) => assumeQuestion(question, answers));
}
