import { describe, expect, it } from 'vitest';
import { DAY_PLAN_TEMPLATES, SURVEY_FIELDS, type SurveyField } from '../thermal/survey';
import { dayPlanInputSchema } from './day-plans';
import { surveyAnswersSchema } from './survey';

describe('survey answers', () => {
	it('may be partial, and any answer may be unknown', () => {
		const answers = { positionKind: 'under-bonnet', exhaustGapMm: 'unknown', bayPlace: 'unknown' };
		expect(surveyAnswersSchema.parse(answers)).toEqual(answers);
	});

	it('name the field, the limit and the unit when a reading is impossible', () => {
		const parsed = surveyAnswersSchema.safeParse({ positionKind: 'cabin', exhaustGapMm: 5 });
		expect(parsed.error?.issues[0]?.message).toBe('Gap to the exhaust must be at least 10 mm.');
	});

	it('say what was wanted when a reading is no number or a choice is none', () => {
		const parsed = surveyAnswersSchema.safeParse({
			positionKind: 'cabin',
			exhaustGapMm: 'near',
			airPath: 'windy'
		});
		expect(parsed.error?.issues.map(({ message }) => message)).toEqual([
			'Gap to the exhaust must be a number of mm.',
			'Air around the battery: choose one of the answers.'
		]);
	});

	it('take every choice that the survey offers and both limits of every length', () => {
		for (const [key, field] of Object.entries(SURVEY_FIELDS) as [string, SurveyField][]) {
			const values =
				field.kind === 'choice' ? field.choices.map(({ value }) => value) : [field.minMm, field.maxMm];
			for (const value of values) {
				const parsed = surveyAnswersSchema.safeParse({ positionKind: 'cabin', [key]: value });
				expect(parsed.data).toMatchObject({ [key]: value });
			}
		}
	});
});

describe('day plan templates', () => {
	it.each(DAY_PLAN_TEMPLATES.map(({ id, plan }) => [id, plan] as const))(
		'%s can be saved as a day plan',
		(_, plan) => {
			expect(dayPlanInputSchema.parse(plan)).toEqual(plan);
		}
	);
});
