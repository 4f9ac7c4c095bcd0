import { describe, expect, it } from 'vitest';
import { describeAnswer } from './describe-answer';
import { SURVEY_FIELDS, type SurveyField } from './fields';
import { isAsked, questionsFor, SURVEY_QUESTIONS } from './questions';
import { POSITION_KINDS, type SurveyAnswers, type SurveyKey } from './types';

describe('the survey', () => {
	it.each([
		['under-bonnet', 7],
		['cabin', 2],
		['cargo-area', 2],
		['canopy-box', 3],
		['chassis-rail', 5]
	] as const)('asks about a position %s in %i questions', (kind, count) => {
		expect(questionsFor(kind)).toHaveLength(count);
	});

	it('asks for every field in exactly one question', () => {
		const asked = SURVEY_QUESTIONS.flatMap(({ fields }) => fields);
		expect([...asked].sort()).toEqual(Object.keys(SURVEY_FIELDS).sort());
	});

	it('says for each question why it is asked and what not knowing takes', () => {
		for (const { title, why, ifUnknown } of SURVEY_QUESTIONS) {
			expect(title).toMatch(/\?$/);
			expect(why).toMatch(/\.$/);
			expect(ifUnknown).toMatch(/\.$/);
		}
	});

	it('assumes only what can be answered', () => {
		for (const field of Object.values(SURVEY_FIELDS) as SurveyField[]) {
			if (field.kind === 'choice') expect(field.choices.map(({ value }) => value)).toContain(field.assumed);
			else if (field.assumedMm === null) expect(field.assumedWords).toBeTruthy();
			else {
				expect(field.assumedMm).toBeGreaterThanOrEqual(field.minMm);
				expect(field.assumedMm).toBeLessThanOrEqual(field.maxMm);
			}
		}
	});

	it('asks no gap to an exhaust that is hidden, and no finish of a shield that is not there', () => {
		const answers: SurveyAnswers = {
			positionKind: 'under-bonnet',
			exhaustFacing: 'hidden',
			shieldKind: 'none'
		};
		const needless: SurveyKey[] = ['exhaustGapMm', 'exhaustSeenWidthMm', 'shieldFinish', 'shieldStandOffMm'];
		expect(needless.filter((key) => isAsked(key, answers))).toEqual([]);
		expect(isAsked('engineGapMm', answers)).toBe(true);
	});

	it('asks nothing about the bay where there is none', () => {
		for (const positionKind of POSITION_KINDS.filter((kind) => kind !== 'under-bonnet')) {
			expect(isAsked('bayPlace', { positionKind })).toBe(false);
			expect(isAsked('trayUnderside', { positionKind })).toBe(false);
		}
	});
});

describe('a described answer', () => {
	const exhaust = SURVEY_QUESTIONS.find(({ id }) => id === 'exhaust')!;

	it('gives the words of the choice and millimetres', () => {
		const described = describeAnswer(exhaust, {
			positionKind: 'under-bonnet',
			exhaustFacing: 'square-on',
			exhaustGapMm: 120
		});
		expect(described.slice(0, 2).map(({ answer }) => answer)).toEqual([
			'Square on to the battery',
			'120\u202Fmm'
		]);
	});

	it('says what is assumed where nobody knows, and tells that from not yet answered', () => {
		const [facing, gap] = describeAnswer(exhaust, { positionKind: 'under-bonnet', exhaustGapMm: 'unknown' });
		expect(facing).toMatchObject({ answer: null, assumed: 'Square on to the battery' });
		expect(gap).toMatchObject({ answer: 'Not known', assumed: '150\u202Fmm' });
	});

	it('leaves out what need not be asked', () => {
		const described = describeAnswer(exhaust, { positionKind: 'under-bonnet', exhaustFacing: 'hidden' });
		expect(described.map(({ key }) => key)).toEqual(['exhaustFacing']);
	});
});
