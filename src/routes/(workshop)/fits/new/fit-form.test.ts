import { describe, expect, it } from 'vitest';
import { fitInputSchema, type FitChoice } from '$lib/schemas/fits';
import { AppError } from '$lib/server/errors';
import { validate } from '$lib/server/http/validate';
import { listFitProblems, listHeldProblems, readFitForm } from './fit-form';

const CHOICE: FitChoice = {
	...{ group: 'battery', key: 'caseCellConductance', meaning: 'Case to cells', unit: 'W/K', basis: '' },
	prior: { law: 'lognormal', middle: 2.5, spread: 0.35 }
};
const BOXES = {
	...{ name: 'Cells', loss: 'squares', 'held.7': '' },
	'battery.caseCellConductance.law': 'lognormal',
	'battery.caseCellConductance.middle': '2.5',
	'battery.caseCellConductance.spread': '0,35'
};

/** What the form says of boxes that hold something else. */
function refusalsOf(changes: Partial<typeof BOXES>) {
	try {
		validate(fitInputSchema, readFitForm({ ...BOXES, ...changes }, [7], [CHOICE]));
		return [];
	} catch (error) {
		return listFitProblems(error as AppError, [7], [CHOICE]);
	}
}

describe('the form about a fit', () => {
	it('is taken as it was typed, with a decimal comma too', () => {
		expect(refusalsOf({})).toEqual([]);
	});

	it.each([
		[{ name: '' }, 'name', /name/i],
		[{ 'held.7': '2, last' }, 'held.7', /whole numbers with commas between, such as 2, 4/],
		[
			{ 'battery.caseCellConductance.spread': '-1' },
			'battery.caseCellConductance.spread',
			/^Case to cells: Spread must be above 0\.$/
		],
		[
			{ 'battery.caseCellConductance.middle': 'two' },
			'battery.caseCellConductance.middle',
			/^Case to cells: Middle must be a number\.$/
		]
	])('says of %o at which box it is refused, and names it', (changes, path, message) => {
		const refused = refusalsOf(changes);
		expect(refused).toEqual([{ path, message: expect.stringMatching(message) as string }]);
	});

	it('says what the thermal model does not take without the name that it has there', () => {
		const path = 'coefficients[0].prior.middle';
		const limit = 'above 0 and below 1';
		const refusal = new AppError('invalid_input', 'no', [{ path, message: `${path} is 20`, limit }]);
		expect(listFitProblems(refusal, [7], [CHOICE])).toEqual([
			{
				path: 'battery.caseCellConductance.middle',
				message: 'Case to cells: Middle must be above 0 and below 1.'
			}
		]);
	});

	it('says of legs that are kept back which there are not, and that one must be left', () => {
		const traces = [{ id: 7, name: 'ridge.csv', legs: [1, 2, 3] }];
		const said = (text: string) => listHeldProblems({ 'held.7': text }, traces);
		expect(said('2, 9, 12')).toEqual([
			{ path: 'held.7', message: '“ridge.csv” has no leg 9, 12: it has 3.' }
		]);
		expect(said('1 2 3')).toMatchObject([
			{ path: 'held.7', message: expect.stringContaining('every leg is kept back') as string }
		]);
		expect([said('2, 3'), said(''), said('last')]).toEqual([[], [], []]);
	});
});
