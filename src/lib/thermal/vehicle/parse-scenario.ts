import { ScenarioError, type ScenarioErrorCode } from '../errors';
import type { Leg, Scenario, ScenarioInput } from '../types';
import { checkConsistency, contradictionsOf, type Contradiction } from './check-consistency';
import {
	FIELD_GROUPS,
	LONGEST_PLAN_MINUTES,
	MOST_LEGS,
	SCENARIO_FIELDS,
	type FieldGroup,
	type NumberField,
	type ScenarioField
} from './scenario-fields';

type Values = Record<string, unknown>;

const fieldsOf = new Map<FieldGroup, ScenarioField[]>(
	FIELD_GROUPS.map((group) => [group, SCENARIO_FIELDS.filter((field) => field.group === group)])
);

const defaultsOf = new Map<FieldGroup, Values>(
	FIELD_GROUPS.map((group) => [
		group,
		Object.fromEntries(fieldsOf.get(group)!.map(({ key, default: value }) => [key, value]))
	])
);
/** Groups that do without defaults in some field. */
const hasRequired = new Set(
	SCENARIO_FIELDS.filter((field) => field.default === null).map(({ group }) => group)
);

/** Groups that stand at the top of a scenario, in the order in which they are checked. */
const TOP_GROUPS = FIELD_GROUPS.filter((group) => !group.includes('.') && group !== 'legs');
const BMS_LIMITS = ['charge', 'discharge'] as const;

/** Keys that may stand in a group: its fields, and in that of the BMS its limits. */
const keysOf = new Map<FieldGroup, readonly string[]>(
	FIELD_GROUPS.map((group) => [
		group,
		[...fieldsOf.get(group)!.map(({ key }) => key), ...(group === 'bms' ? BMS_LIMITS : [])]
	])
);

function fail(code: ScenarioErrorCode, path: string, value: unknown, limit: string): never {
	throw new ScenarioError({ code, path, value, limit });
}

function requireObject(value: unknown, path: string): Values {
	if (typeof value !== 'object' || value === null || Array.isArray(value)) {
		fail('wrong_type', path, value, 'an object');
	}
	return value as Values;
}

function requireKnownKeys(values: Values, known: readonly string[], prefix: string): void {
	for (const key of Object.keys(values)) {
		if (!known.includes(key)) {
			fail('unknown_field', prefix + key, values[key], `the known ones are ${known.join(', ')}`);
		}
	}
}

function ownValue(values: Values, key: string): unknown {
	return Object.hasOwn(values, key) ? values[key] : undefined;
}

/**
 * The range of a number field in words.
 *
 * @param field one of SCENARIO_FIELDS that is a number
 * @returns a part of a sentence, with the unit
 * Validity: every number field.
 * Source: our own.
 * @example
 * describeRange({ kind: 'number', unit: 'W/K', min: 0, max: 1, minExclusive: true }); // 'a number, more than 0 and at most 1 W/K'
 */
export function describeRange(field: NumberField): string {
	const unit = field.unit === '-' ? '' : ` ${field.unit}`;
	const low = `${field.minExclusive ? 'more than' : 'at least'} ${field.min}`;
	const high = `${field.maxExclusive ? 'less than' : 'at most'} ${field.max}`;
	return `a number, ${low} and ${high}${unit}`;
}

function parseNumber(field: NumberField, value: unknown, path: string): number {
	if (value === undefined) fail('missing_field', path, value, describeRange(field));
	if (typeof value !== 'number') fail('wrong_type', path, value, describeRange(field));
	if (!Number.isFinite(value)) fail('not_finite', path, value, describeRange(field));
	const tooLow = field.minExclusive ? value <= field.min : value < field.min;
	const tooHigh = field.maxExclusive ? value >= field.max : value > field.max;
	if (tooLow || tooHigh) fail('out_of_range', path, value, describeRange(field));
	return value;
}

/** Paths are put together only where something is wrong: a hundred fields are read for each scenario. */
function parseField(field: ScenarioField, value: unknown, group: string): unknown {
	if (value === undefined && field.default !== null) return field.default;
	const path = `${group}.${field.key}`;
	if (field.kind === 'number') return parseNumber(field, value, path);
	if (field.kind === 'flag') {
		if (typeof value !== 'boolean') fail('wrong_type', path, value, 'true or false');
		return value;
	}
	const limit = `one of ${field.choices.join(', ')}`;
	if (typeof value !== 'string') fail('wrong_type', path, value, limit);
	if (!field.choices.includes(value)) fail('not_a_choice', path, value, limit);
	return value;
}

function parseGroup(group: FieldGroup, input: unknown, path: string): Values {
	const parsed = { ...defaultsOf.get(group) };
	if (input === undefined && !hasRequired.has(group)) return parsed;
	const values = input === undefined ? {} : requireObject(input, path);
	requireKnownKeys(values, keysOf.get(group)!, `${path}.`);
	for (const field of fieldsOf.get(group)!) {
		parsed[field.key] = parseField(field, ownValue(values, field.key), path);
	}
	return parsed;
}

function parseBms(input: unknown): Values {
	const parsed = parseGroup('bms', input, 'bms');
	const values = (input ?? {}) as Values;
	for (const side of BMS_LIMITS) {
		parsed[side] = parseGroup(`bms.${side}`, ownValue(values, side), `bms.${side}`);
	}
	return parsed;
}

function parseTopGroup(group: FieldGroup, input: unknown): Values | null {
	if (group === 'bms') return parseBms(input);
	if (group === 'shield' && (input === undefined || input === null)) return null;
	return parseGroup(group, input, group);
}

/** Legs that were split into equal parts do not add up to the last digit, min. */
const ROUNDING_MIN = 1e-6;

function parseLegs(input: unknown): Leg[] {
	const limit = `a list of 1 to ${MOST_LEGS} legs`;
	if (input === undefined) fail('missing_field', 'legs', input, limit);
	if (!Array.isArray(input)) fail('wrong_type', 'legs', input, limit);
	if (input.length === 0) fail('no_legs', 'legs', 0, limit);
	if (input.length > MOST_LEGS) fail('too_many_legs', 'legs', input.length, limit);
	const legs = Array.from(input, (leg: unknown, index) => {
		const path = `legs[${index}]`;
		return parseGroup('legs', leg === undefined ? null : leg, path) as unknown as Leg;
	});
	const minutes = legs.reduce((sum, leg) => sum + leg.minutes, 0);
	if (minutes > LONGEST_PLAN_MINUTES + ROUNDING_MIN) {
		fail('too_long', 'legs', minutes, `at most ${LONGEST_PLAN_MINUTES} minutes (60 days)`);
	}
	return legs;
}

/** Each field for itself, with the defaults filled in. */
function parseFields(input: unknown): Scenario {
	const values = requireObject(input, '');
	requireKnownKeys(values, [...TOP_GROUPS, 'legs'], '');
	const parsed: Values = {};
	for (const group of TOP_GROUPS) parsed[group] = parseTopGroup(group, ownValue(values, group));
	parsed.legs = parseLegs(ownValue(values, 'legs'));
	return parsed as unknown as Scenario;
}

/**
 * Checks what people or programs wrote and fills in the defaults.
 *
 * Checked in a fixed order, the first fault is reported: names of groups, then group by group (names of fields,
 * then each field in the order of SCENARIO_FIELDS), the legs, and last what several fields say together.
 *
 * @param input anything; absent groups and fields take the defaults, an absent or null shield is none
 * @returns a whole scenario that the engine can run
 * @throws ScenarioError with code, path, value and limit
 * Validity: the limits of SCENARIO_FIELDS.
 * Source: the thermal model, for fields, limits and defaults.
 * @example
 * parseScenario({ legs: [{ minutes: 60 }] }).charger.maxA; // 40
 */
export function parseScenario(input: unknown): Scenario {
	const scenario = parseFields(input);
	checkConsistency(scenario);
	return scenario;
}

/**
 * What a set of coefficients says that cannot be true together, among themselves or beside the thermal model's own values
 * of what is surveyed.
 *
 * @param coefficients values by group and key, each within its own limits
 * @returns every rule that is broken: where, the value, the limit, and the field that it is held against; empty where none is
 * @throws ScenarioError when a value lies outside its own limits
 * Validity: the limits of SCENARIO_FIELDS.
 * Source: the rules that every scenario is held to.
 * @example
 * findContradictions({ engine: { thermostatOpen: 99 } })[0]?.limit; // 'above engine.thermostatOpen, 99 °C'
 */
export function findContradictions(coefficients: Record<string, Record<string, number>>): Contradiction[] {
	return contradictionsOf(parseFields({ ...coefficients, legs: [{ minutes: 60 }] }));
}

/**
 * The scenario of the thermal model's defaults, without a shield, for the legs given.
 *
 * @param legs at least one leg with its minutes; the rest of a leg takes its defaults
 * @returns a whole scenario that the engine can run
 * @throws ScenarioError when a leg is not possible
 * Validity: as parseScenario.
 * Source: the defaults of the thermal model.
 * @example
 * defaultScenario([{ minutes: 60 }]).climate.tMax; // 42
 */
export function defaultScenario(legs: ScenarioInput['legs']): Scenario {
	return parseScenario({ legs });
}
