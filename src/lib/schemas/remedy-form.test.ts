import { describe, expect, it } from 'vitest';
import { parseForm, toFormValues } from '../format/form-values';
import { priceRemedies } from '../thermal/outlook';
import { fromRemedyForm, remedyBoxes, remedyFormSchema, toRemedyForm } from './remedy-form';
import type { RemedyListInput } from './remedies';

const LIST: RemedyListInput = {
	moneyPerHour: 110,
	offers: priceRemedies().map(({ key, cost, hours }) => ({
		key,
		cost: cost + 5,
		hours,
		offered: key !== 'fan'
	})),
	version: 3
};
const typed = (changes: Record<string, string | boolean> = {}) => ({
	...toFormValues(remedyFormSchema, toRemedyForm(LIST)),
	version: '3',
	...changes
});

describe('the list of remedies as a form', () => {
	it('comes back as it went out', () => {
		const answer = parseForm(remedyFormSchema, typed());
		expect('data' in answer && fromRemedyForm(answer.data as never)).toEqual(LIST);
	});

	it('may be one that nobody has kept yet', () => {
		const answer = parseForm(remedyFormSchema, typed({ version: '' }));
		expect('data' in answer && fromRemedyForm(answer.data as never).version).toBeNull();
	});

	it('names the remedy in what is wrong', () => {
		const { cost, hours } = remedyBoxes('wrap');
		const answer = parseForm(remedyFormSchema, typed({ [cost]: 'cheap', [hours]: '' }));
		expect('errors' in answer && answer.errors).toEqual([
			{ path: cost, message: 'Reflective wrap, parts must be a number from 0 to 100000.' },
			{ path: hours, message: 'Reflective wrap, work is missing.' }
		]);
	});

	it('names it with the limit, too, where a figure is beyond it', () => {
		const { cost, hours } = remedyBoxes('wrap');
		const answer = parseForm(
			remedyFormSchema,
			typed({ [cost]: '200000', [hours]: '300', moneyPerHour: '-1' })
		);
		expect('errors' in answer && answer.errors).toEqual([
			{ path: 'moneyPerHour', message: 'An hour of work must be a number from 0 to 100000.' },
			{ path: cost, message: 'Reflective wrap, parts must be a number from 0 to 100000.' },
			{ path: hours, message: 'Reflective wrap, work must be at most 200 h.' }
		]);
	});

	it('takes minutes where hours are stored', () => {
		const answer = parseForm(remedyFormSchema, typed({ [remedyBoxes('duct').hours]: '90 min' }));
		const list = 'data' in answer ? fromRemedyForm(answer.data as never) : LIST;
		expect(list.offers.find(({ key }) => key === 'duct')?.hours).toBeCloseTo(1.5, 9);
	});
});
