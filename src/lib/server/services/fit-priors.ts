import type { FitChoice } from '$lib/schemas/fits';
import type { BookView } from '$lib/schemas/books';
import { defaultScenario } from '$lib/thermal';
import { FITTED_GROUPS, type CoefficientPrior, type FittedGroup } from '$lib/thermal/fit';
import { copyScenario, PRIORS, type Prior } from '$lib/thermal/uncertainty';
import { coefficientField } from './coefficient-sources';

const A_LITTLE = 1.01;
const LAWS = { factor: 'lognormal', share: 'logit-normal', shift: 'normal' } as const;
/** Where nothing is said of how uncertain a coefficient is; engineering judgement. */
const USUAL_SPREAD = { lognormal: 0.3, 'logit-normal': 0.5, normal: 0.3 } as const;
const JUDGEMENT = 'Engineering judgement, no source.';

type Numbers = Readonly<Record<string, unknown>> | null;

/** Which coefficients a prior speaks of: those that are another number once it has changed a scenario. */
function touchedBy({ apply }: Prior): string[] {
	const before = defaultScenario([{ minutes: 60 }]);
	const with_ = copyScenario(before);
	apply(with_, (value) => value * A_LITTLE);
	return FITTED_GROUPS.flatMap((group) => {
		const [old, changed] = [before[group] as unknown as Numbers, with_[group] as unknown as Numbers];
		if (!old || !changed) return [];
		return Object.keys(old)
			.filter((key) => old[key] !== changed[key])
			.map((key) => `${group}.${key}`);
	});
}

const priorOf = new Map(
	PRIORS.flatMap((prior) => touchedBy(prior).map((path) => [path, prior] as const)).reverse()
);

const LIMITS: Readonly<Record<CoefficientPrior['law'], (middle: number) => boolean>> = {
	lognormal: (middle) => middle > 0,
	'logit-normal': (middle) => middle > 0 && middle < 1,
	normal: () => true
};

function lawFor(min: number, max: number): CoefficientPrior['law'] {
	if (min >= 0 && max <= 1) return 'logit-normal';
	return min >= 0 ? 'lognormal' : 'normal';
}

/** What is held of a coefficient before any data: about the book's value, as far off as the uncertainties say. */
function believe(path: string, middle: number, min: number, max: number): Pick<FitChoice, 'prior' | 'basis'> {
	const known = priorOf.get(path);
	const law = known ? LAWS[known.spread.kind] : lawFor(min, max);
	if (!LIMITS[law](middle)) {
		return { prior: { law: 'normal', middle, spread: 0.1 * Math.max(max - min, 1e-3) }, basis: JUDGEMENT };
	}
	const usual = law === 'normal' ? USUAL_SPREAD.normal * Math.max(Math.abs(middle), 1) : USUAL_SPREAD[law];
	return { prior: { law, middle, spread: known?.spread.sigma ?? usual }, basis: known?.basis ?? JUDGEMENT };
}

const isFitted = (group: string): group is FittedGroup => FITTED_GROUPS.some((each) => each === group);

/** The coefficients of a book that can be fitted. */
export function listFitChoices({ coefficients }: BookView): FitChoice[] {
	return coefficients.flatMap(({ group, key, value, meaning, unit }) => {
		const field = coefficientField(group, key);
		if (!field || !isFitted(group)) return [];
		const held = believe(`${group}.${key}`, value, field.min, field.max);
		return [{ group, key, meaning: meaning.replace(/\.$/, ''), unit, ...held }];
	});
}
