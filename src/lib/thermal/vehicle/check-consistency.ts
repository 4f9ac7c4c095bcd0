import { ScenarioError } from '../errors';
import type { Scenario } from '../types';
import { ABSOLUTE_ZERO_C } from './scenario-fields';

interface Rule {
	path: string;
	/** The value that is out of step, or null where the rule does not apply. */
	value: (scenario: Scenario) => number | null;
	holds: (scenario: Scenario) => boolean;
	limit: (scenario: Scenario) => string;
}

/** What several fields must say together; the first broken rule is reported. */
const RULES: readonly Rule[] = [
	{
		path: 'engine.thermostatFull',
		value: ({ engine }) => engine.thermostatFull,
		holds: ({ engine }) => engine.thermostatFull > engine.thermostatOpen,
		limit: ({ engine }) => `above engine.thermostatOpen, ${engine.thermostatOpen} °C`
	},
	{
		path: 'exhaust.gasFull',
		value: ({ exhaust }) => exhaust.gasFull,
		holds: ({ exhaust }) => exhaust.gasFull >= exhaust.gasIdle,
		limit: ({ exhaust }) => `not below exhaust.gasIdle, ${exhaust.gasIdle} °C`
	},
	{
		path: 'battery.topArea',
		value: ({ battery }) => battery.topArea,
		holds: ({ battery }) => battery.topArea <= battery.caseArea,
		limit: ({ battery }) => `at most battery.caseArea, ${battery.caseArea} m²`
	},
	{
		path: 'shield.area',
		value: ({ shield }) => shield?.area ?? null,
		holds: ({ shield, battery }) => (shield?.area ?? 0) <= battery.caseArea,
		limit: ({ battery }) => `at most battery.caseArea, ${battery.caseArea} m²`
	},
	{
		path: 'bms.charge.reset',
		value: ({ bms }) => bms.charge.reset,
		holds: ({ bms }) => bms.charge.reset < bms.charge.cut,
		limit: ({ bms }) => `below bms.charge.cut, ${bms.charge.cut} °C`
	},
	{
		path: 'bms.discharge.reset',
		value: ({ bms }) => bms.discharge.reset,
		holds: ({ bms }) => bms.discharge.reset < bms.discharge.cut,
		limit: ({ bms }) => `below bms.discharge.cut, ${bms.discharge.cut} °C`
	},
	{
		path: 'climate.skyDropK',
		value: ({ climate }) => climate.skyDropK,
		holds: ({ climate }) => climate.tMax - climate.dailyRange - climate.skyDropK > ABSOLUTE_ZERO_C,
		limit: () => 'small enough to keep the coolest sky above absolute zero'
	}
];

/** Throws a ScenarioError for the first rule that the scenario breaks. */
export function checkConsistency(scenario: Scenario): void {
	for (const rule of RULES) {
		if (rule.holds(scenario)) continue;
		throw new ScenarioError({
			code: 'inconsistent',
			path: rule.path,
			value: rule.value(scenario),
			limit: rule.limit(scenario)
		});
	}
}
