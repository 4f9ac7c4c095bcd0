import { describe, expect, it } from 'vitest';
import type { BookView } from '$lib/schemas/books';
import { COEFFICIENT_FIELDS } from './coefficient-sources';
import { listFitChoices } from './fit-priors';

const book = {
	coefficients: COEFFICIENT_FIELDS.map(({ group, key, unit, meaning, default: value }) => ({
		...{ group, key, unit, meaning, value, default: value, origin: 'judgement', source: '' }
	}))
} as unknown as BookView;
const choices = listFitChoices(book);
const priorOf = (path: string) => choices.find(({ group, key }) => `${group}.${key}` === path)!.prior;

describe('what is held of a coefficient before a fit', () => {
	it('is as wide as the uncertainties of an assessment say', () => {
		expect(priorOf('bay.leakClosed')).toEqual({ law: 'lognormal', middle: 20, spread: 0.4 });
		expect(priorOf('battery.caseCellConductance')).toMatchObject({ law: 'lognormal', spread: 0.35 });
		expect(priorOf('bonnet.absorptivity')).toMatchObject({ law: 'logit-normal', spread: 0.5 });
		expect(priorOf('tray.guardConductance')).toMatchObject({ law: 'lognormal', spread: 0.6 });
	});

	it('suits the value that it is about, whatever the coefficient', () => {
		expect(choices.length).toBeGreaterThan(30);
		for (const { prior } of choices) {
			expect(prior.spread).toBeGreaterThan(0);
			if (prior.law === 'lognormal') expect(prior.middle).toBeGreaterThan(0);
			if (prior.law === 'logit-normal') expect([prior.middle > 0, prior.middle < 1]).toEqual([true, true]);
		}
	});

	it('is asked of vehicle, mount and battery alone, not of the day', () => {
		expect(choices.map(({ group }) => group)).not.toContain('climate');
		expect(choices.map(({ group }) => group)).not.toContain('charger');
	});
});
