import { ScenarioError, type ScenarioFault } from '../errors';
import type { Scenario } from '../types';
import { ABSOLUTE_ZERO_C } from './scenario-fields';

interface Rule {
	path: string;
	/** The field that it is held against, where that is a single one. */
	against: string | null;
	/** The value that is out of step, or null where the rule does not apply. */
	value: (scenario: Scenario) => number | null;
	holds: (scenario: Scenario) => boolean;
	limit: (scenario: Scenario) => string;
}

/** What several fields must say together. */
const RULES: readonly Rule[] = [
	{
		path: 'engine.thermostatFull',
		against: 'engine.thermostatOpen',
		value: ({ engine }) => engine.thermostatFull,
		holds: ({ engine }) => engine.thermostatFull > engine.thermostatOpen,
		limit: ({ engine }) => `above engine.thermostatOpen, ${engine.thermostatOpen} °C`
	},
	{
		path: 'exhaust.gasFull',
		against: 'exhaust.gasIdle',
		value: ({ exhaust }) => exhaust.gasFull,
		holds: ({ exhaust }) => exhaust.gasFull >= exhaust.gasIdle,
		limit: ({ exhaust }) => `not below exhaust.gasIdle, ${exhaust.gasIdle} °C`
	},
	{
		path: 'battery.topArea',
		against: 'battery.caseArea',
		value: ({ battery }) => battery.topArea,
		holds: ({ battery }) => battery.topArea <= battery.caseArea,
		limit: ({ battery }) => `at most battery.caseArea, ${battery.caseArea} m²`
	},
	{
		path: 'shield.area',
		against: 'battery.caseArea',
		value: ({ shield }) => shield?.area ?? null,
		holds: ({ shield, battery }) => (shield?.area ?? 0) <= battery.caseArea,
		limit: ({ battery }) => `at most battery.caseArea, ${battery.caseArea} m²`
	},
	{
		path: 'bms.charge.reset',
		against: 'bms.charge.cut',
		value: ({ bms }) => bms.charge.reset,
		holds: ({ bms }) => bms.charge.reset < bms.charge.cut,
		limit: ({ bms }) => `below bms.charge.cut, ${bms.charge.cut} °C`
	},
	{
		path: 'bms.discharge.reset',
		against: 'bms.discharge.cut',
		value: ({ bms }) => bms.discharge.reset,
		holds: ({ bms }) => bms.discharge.reset < bms.discharge.cut,
		limit: ({ bms }) => `below bms.discharge.cut, ${bms.discharge.cut} °C`
	},
	{
		path: 'climate.skyDropK',
		against: null,
		value: ({ climate }) => climate.skyDropK,
		holds: ({ climate }) => climate.tMax - climate.dailyRange - climate.skyDropK > ABSOLUTE_ZERO_C,
		limit: () => 'small enough to keep the coolest sky above absolute zero'
	}
];

/** A rule that is broken: the fault, and the other field of the two. */
export interface Contradiction extends ScenarioFault {
	against: string | null;
}

/** Every rule that a scenario breaks, in their order. */
export const contradictionsOf = (scenario: Scenario): Contradiction[] =>
	RULES.filter(({ holds }) => !holds(scenario)).map(({ path, against, value, limit }) => ({
		code: 'inconsistent',
		...{ path, against },
		value: value(scenario),
		limit: limit(scenario)
	}));

/** Throws a ScenarioError for the first rule that the scenario breaks. */
export function checkConsistency(scenario: Scenario): void {
	const [first] = contradictionsOf(scenario);
	if (first) throw new ScenarioError(first);
}
