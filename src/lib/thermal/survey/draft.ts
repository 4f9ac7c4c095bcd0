import type { ScenarioInput } from '../types';
import { SCENARIO_FIELDS, type FieldGroup } from '../vehicle/scenario-fields';
import type { CoefficientBook, Derivation } from './types';

type Value = number | string | boolean;
type Groups = Record<string, Record<string, unknown>>;

const fieldAt = new Map(SCENARIO_FIELDS.map((field) => [`${field.group}.${field.key}`, field]));

/** Groups that a book never lays under a scenario by itself: the day plan's, and a shield that may not be there. */
const NOT_LAID_UNDER: readonly string[] = ['legs', 'shield'];

/** Four significant digits, without trailing zeros: for the formulas that people read. */
export function show(value: number): string {
	return String(Number(value.toPrecision(4)));
}

/** A scenario in the making: the book laid under, each derived value with its reason on top. */
export class ScenarioDraft {
	readonly derivations: Derivation[] = [];
	readonly assumptions: string[] = [];
	private readonly groups: Groups = {};

	constructor(private readonly coefficients: CoefficientBook) {
		for (const [group, values] of Object.entries(coefficients)) {
			if (NOT_LAID_UNDER.includes(group)) continue;
			for (const [key, value] of Object.entries(values)) this.put(group, key, value);
		}
	}

	/** The book's value, or the thermal model's default where the book is silent. */
	coefficient(group: FieldGroup, key: string): number {
		const value = this.coefficients[group]?.[key] ?? fieldAt.get(`${group}.${key}`)?.default;
		if (typeof value !== 'number') throw new Error(`${group}.${key} is not a number of the thermal model.`);
		return value;
	}

	/** Sets a value and writes down why. */
	derive(group: FieldGroup, key: string, value: Value, basis: string): void {
		const path = `${group}.${key}`;
		const field = fieldAt.get(path);
		if (!field) throw new Error(`${path} is not a field of the thermal model.`);
		this.put(group, key, value);
		this.derivations.push({
			path,
			label: field.meaning.replace(/\.$/, ''),
			value: typeof value === 'boolean' ? (value ? 'yes' : 'no') : value,
			unit: field.unit,
			basis
		});
	}

	/** Sets several values that share a reason. */
	deriveAll(group: FieldGroup, values: Record<string, Value>, basis: string): void {
		for (const [key, value] of Object.entries(values)) this.derive(group, key, value, basis);
	}

	assume(sentence: string): void {
		this.assumptions.push(sentence);
	}

	build(legs: ScenarioInput['legs']): ScenarioInput {
		// Every key was checked against the table of fields above, or stands in the book and is checked when it is run.
		return { ...this.groups, legs } as unknown as ScenarioInput;
	}

	private put(group: string, key: string, value: unknown): void {
		const [outer = group, inner] = group.split('.');
		const home = (this.groups[outer] ??= {});
		if (inner === undefined) home[key] = value;
		else ((home[inner] ??= {}) as Record<string, unknown>)[key] = value;
	}
}
