import { EngineInputError, requirePositive } from '../correlations/require';
import { expOf } from '../solve/elementary';
import type { Scenario } from '../types';
import { SCENARIO_FIELDS, type NumberField } from '../vehicle/scenario-fields';
import type { Bounds } from './problem';

/** Groups of a scenario whose numbers can be fitted: those of vehicle and mount, not those of the day. */
export const FITTED_GROUPS = [
	...(['vehicle', 'engine', 'exhaust', 'bay', 'bonnet'] as const),
	...(['enclosure', 'position', 'shield', 'tray', 'battery'] as const)
] as const;
export type FittedGroup = (typeof FITTED_GROUPS)[number];

/**
 * What is held of a coefficient before the data. `middle` is its median in its own unit; `spread` one standard deviation: of the
 * value itself (normal), of its natural logarithm (lognormal), or of ln(v/(1 − v)) (logit-normal, for shares).
 */
export interface CoefficientPrior {
	law: 'normal' | 'lognormal' | 'logit-normal';
	middle: number;
	spread: number;
}

/** A coefficient to be fitted. */
export interface FittedCoefficient {
	group: FittedGroup;
	key: string;
	prior: CoefficientPrior;
	/** In its own unit; those of the table of scenario fields hold in any case. */
	bounds?: Bounds;
}

interface Law {
	/** The value on the scale on which the prior is normal, and back. */
	stretch: (value: number) => number;
	shrink: (stretched: number) => number;
	holds: (middle: number) => boolean;
	limit: string;
}

const LAWS: Readonly<Record<CoefficientPrior['law'], Law>> = {
	normal: { stretch: (v) => v, shrink: (s) => s, holds: Number.isFinite, limit: 'a finite number' },
	lognormal: {
		stretch: (v) => Math.log(v),
		shrink: expOf,
		holds: (v) => v > 0 && v < Infinity,
		limit: 'a finite number above 0'
	},
	'logit-normal': {
		stretch: (v) => Math.log(v / (1 - v)),
		shrink: (s) => 1 / (1 + expOf(-s)),
		holds: (v) => v > 0 && v < 1,
		limit: 'above 0 and below 1'
	}
};

/** An end that a field's range leaves out is kept away from by this share of its size, or this much. */
const WITHIN = 1e-9;

/** The value that lies z standard deviations of the prior above its middle. */
export function valueAt({ law, middle, spread }: CoefficientPrior, z: number): number {
	return LAWS[law].shrink(LAWS[law].stretch(middle) + spread * z);
}

/** How many standard deviations of the prior a value lies above its middle; infinite where the law does not reach. */
export function placeOf({ law, middle, spread }: CoefficientPrior, value: number): number {
	return (LAWS[law].stretch(value) - LAWS[law].stretch(middle)) / spread;
}

function findField({ group, key }: FittedCoefficient, path: string): NumberField {
	const field = SCENARIO_FIELDS.find((each) => each.group === group && each.key === key);
	if (field?.kind !== 'number' || !FITTED_GROUPS.includes(group)) {
		throw new EngineInputError(`${path} ${group}.${key}`, NaN, 'a number of vehicle, mount or battery');
	}
	return field;
}

/** A coefficient that was checked, with its bounds in its own unit and in standard deviations of its prior. */
export interface Coefficient {
	group: FittedGroup;
	key: string;
	unit: string;
	prior: CoefficientPrior;
	low: number;
	high: number;
	lowZ: number;
	highZ: number;
}

function findBounds({ bounds = {} }: FittedCoefficient, field: NumberField): { low: number; high: number } {
	const inside = (end: number, excluded: boolean) => (excluded ? WITHIN * Math.max(Math.abs(end), 1) : 0);
	return {
		low: Math.max(bounds.low ?? -Infinity, field.min + inside(field.min, field.minExclusive)),
		high: Math.min(bounds.high ?? Infinity, field.max - inside(field.max, field.maxExclusive))
	};
}

function readCoefficient(wanted: FittedCoefficient, path: string): Coefficient {
	const { group, key, prior } = wanted;
	const field = findField(wanted, path);
	requirePositive({ [`${path}.prior.spread`]: prior.spread });
	const { holds, limit } = LAWS[prior.law];
	if (!holds(prior.middle)) throw new EngineInputError(`${path}.prior.middle`, prior.middle, limit);
	const { low, high } = findBounds(wanted, field);
	if (!(low < high)) throw new EngineInputError(`${path}.bounds.low`, low, `below ${high}`);
	if (!(prior.middle >= low && prior.middle <= high)) {
		throw new EngineInputError(`${path}.prior.middle`, prior.middle, `within ${low} to ${high}`);
	}
	// Beyond the reach of the law there is nothing to bound.
	const place = (value: number, beyond: number) => {
		const z = placeOf(prior, value);
		return Number.isNaN(z) ? beyond : z;
	};
	const [lowZ, highZ] = [place(low, -Infinity), place(high, Infinity)];
	return { group, key, unit: field.unit, prior, low, high, lowZ, highZ };
}

/** Checks the coefficients and works out their bounds. */
export function readCoefficients(wanted: readonly FittedCoefficient[]): Coefficient[] {
	if (wanted.length === 0) throw new EngineInputError('coefficients.length', 0, 'at least 1');
	return wanted.map((each, at) => {
		const first = wanted.findIndex(({ group, key }) => group === each.group && key === each.key);
		if (first < at)
			throw new EngineInputError(`coefficients[${at}]`, NaN, `another than coefficients[${first}]`);
		return readCoefficient(each, `coefficients[${at}]`);
	});
}

/** Everything that readCoefficients would refuse of single coefficients, where that stops at the first. */
export function findPriorFaults(wanted: readonly FittedCoefficient[]): EngineInputError[] {
	return wanted.flatMap((each, at) => {
		try {
			readCoefficient(each, `coefficients[${at}]`);
			return [];
		} catch (error) {
			if (error instanceof EngineInputError) return [error];
			throw error;
		}
	});
}

/** Writes a value into a scenario of the writer's own; nothing where the scenario has no such group. */
export function setCoefficient(
	scenario: Scenario,
	{ group, key }: Pick<Coefficient, 'group' | 'key'>,
	value: number
): void {
	const values = scenario[group] as Record<string, number> | null;
	if (values) values[key] = value;
}
