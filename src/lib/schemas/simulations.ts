import { z } from 'zod';
import { MOST_LEGS, SCENARIO_FIELDS, type ScenarioField } from '../thermal';
import { NODE_NAMES } from '../thermal/types';
import type { SimulationReport } from '../thermal/types';

type JsonSchema = Record<string, unknown>;

function describeField(field: ScenarioField): JsonSchema {
	const description = field.unit === '-' ? field.meaning : `${field.meaning} In ${field.unit}.`;
	const known = field.default === null ? {} : { default: field.default };
	if (field.kind === 'flag') return { type: 'boolean', description, ...known };
	if (field.kind === 'choice') return { type: 'string', enum: [...field.choices], description, ...known };
	return {
		type: 'number',
		description,
		...known,
		[field.minExclusive ? 'exclusiveMinimum' : 'minimum']: field.min,
		[field.maxExclusive ? 'exclusiveMaximum' : 'maximum']: field.max
	};
}

function describeGroup(group: string, nested: JsonSchema = {}): JsonSchema {
	const fields = SCENARIO_FIELDS.filter((field) => field.group === group);
	const properties = Object.fromEntries(fields.map((field) => [field.key, describeField(field)]));
	const required = fields
		.filter((field) => field.kind === 'number' && field.default === null)
		.map(({ key }) => key);
	return {
		type: 'object',
		properties: { ...properties, ...nested },
		...(required.length > 0 ? { required } : {}),
		additionalProperties: false
	};
}

const PLAIN_GROUPS = [
	...new Set(SCENARIO_FIELDS.map(({ group }) => group).filter((group) => !group.includes('.')))
].filter((group) => !['bms', 'shield', 'legs'].includes(group));

const scenarioJsonSchema: JsonSchema = {
	type: 'object',
	description:
		'A scenario with the field names of the thermal model: absent groups and fields take the defaults, an absent or null shield is none, an empty one the default wrap.',
	properties: {
		...Object.fromEntries(PLAIN_GROUPS.map((group) => [group, describeGroup(group)])),
		shield: { anyOf: [describeGroup('shield'), { type: 'null' }] },
		bms: describeGroup('bms', {
			charge: describeGroup('bms.charge'),
			discharge: describeGroup('bms.discharge')
		}),
		legs: { type: 'array', minItems: 1, maxItems: MOST_LEGS, items: describeGroup('legs') }
	},
	required: ['legs'],
	additionalProperties: false
};

/** Anything: the engine checks it itself, and says what, where and the limit. The document is told from its own table. */
export const scenarioSchema = z.unknown().meta(scenarioJsonSchema);

const hour = z.number().meta({ description: 'Clock hour since midnight of the first day; runs on past 24' });
const nodes = Object.fromEntries(
	NODE_NAMES.map((name) => [name, name === 'shield' ? z.number().nullable() : z.number()])
);
const soc = z.number();

/** The same answer as the command line's. */
export const simulationReportSchema = z.object({
	peakCellsC: z.number(),
	peakAtHour: hour,
	peaks: z.object(nodes),
	end: z.object({ ...nodes, soc }),
	events: z.array(z.object({ side: z.enum(['charge', 'discharge']), kind: z.enum(['cut', 'reset']), hour })),
	hourly: z.array(z.object({ hour, ...nodes, soc })),
	energy: z.object({ maxRelativeImbalance: z.number() }),
	steps: z.number().int(),
	evaluations: z.number().int()
}) as unknown as z.ZodType<SimulationReport, SimulationReport>;
