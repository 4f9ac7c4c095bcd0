import { describeAssumed } from './describe-answer';
import { SURVEY_FIELDS, type ChoiceKey, type LengthKey, type SurveyField } from './fields';
import { isAsked } from './questions';
import { UNKNOWN, type SurveyAnswers, type SurveyKey } from './types';

type Choice<K extends ChoiceKey> = (typeof SURVEY_FIELDS)[K]['assumed'];

/** Reads a survey: what was answered, or the cautious value, and says each time that it took one. */
export class AnswerReader {
	private readonly said = new Set<SurveyKey>();

	constructor(
		readonly survey: SurveyAnswers,
		private readonly assume: (sentence: string) => void
	) {}

	/** The choice that was made, or the cautious one. */
	choose<K extends ChoiceKey>(key: K): Choice<K> {
		const given = this.survey[key];
		if (given !== undefined && given !== UNKNOWN) return given as Choice<K>;
		this.sayAssumed(key);
		return SURVEY_FIELDS[key].assumed;
	}

	/** The reading in metres, or the cautious one; `ownM` where that comes from the battery. */
	lengthM(key: LengthKey, ownM = 0): number {
		const given = this.survey[key];
		if (typeof given === 'number') return given / 1000;
		this.sayAssumed(key);
		const { assumedMm } = SURVEY_FIELDS[key];
		return assumedMm === null ? ownM : assumedMm / 1000;
	}

	private sayAssumed(key: SurveyKey): void {
		if (this.said.has(key) || !isAsked(key, this.survey)) return;
		this.said.add(key);
		const field: SurveyField = SURVEY_FIELDS[key];
		const what = this.survey[key] === UNKNOWN ? 'not known' : 'not yet answered';
		this.assume(`${field.label}: ${what}. Taken: ${lowerFirst(describeAssumed(field).replace(/\.$/, ''))}.`);
	}
}

function lowerFirst(words: string): string {
	return words.charAt(0).toLowerCase() + words.slice(1);
}
