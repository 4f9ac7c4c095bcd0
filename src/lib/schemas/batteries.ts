import { z } from 'zod';
import { metaOfField } from '../format/form-fields';
import {
	CHEMISTRY_KEYS,
	CUT_OFF_FIELDS,
	findChemistry,
	HEAT_LIMIT_FIELDS,
	heatFieldsOf,
	type ChemistryKey
} from '../thermal/chemistries';
import type { PositionKind } from '../thermal/survey/types';
import { SENSORS, type Sensor } from '../thermal/types';
import { editedSchema, measure, optionalWords, versionSchema, words } from './fields';

export type { Sensor };

/** The kinds of battery that the engine knows, by their names. */
export const CHEMISTRIES = CHEMISTRY_KEYS;
export type Chemistry = ChemistryKey;

export const UNDER_BONNET_WORDS = ['allowed', 'conditional', 'silent', 'excluded'] as const;
export type UnderBonnetWord = (typeof UNDER_BONNET_WORDS)[number];

/** Whether a battery's maker does not allow it where it is to go: that word is about the bonnet alone. */
export const isExcludedAt = (
	{ underBonnet }: { underBonnet: UnderBonnetWord },
	positionKind: PositionKind
): boolean => positionKind === 'under-bonnet' && underBonnet === 'excluded';

/** Whether electronics of its own switch a battery of this chemistry off; a name that is none has them. */
export const hasBms = (chemistry: string): boolean => findChemistry(chemistry)?.hasBms ?? true;

const OF_A_BMS = 'Asked for a battery with a BMS, null for one without: what is given then is not kept';
const OF_LEAD_ACID = 'Asked for a battery without a BMS, null for one with: what is given then is not kept';

/** Asked for a battery with a BMS only. */
const cutOff = <T extends z.ZodType>(field: T) =>
	field
		.nullable()
		.default(null as never)
		.meta({ description: OF_A_BMS });
/** Asked for a battery without a BMS only; records older than that have none. */
const heatLimit = <T extends z.ZodType>(field: T) => field.nullish().meta({ description: OF_LEAD_ACID });

const fields = z.object({
	maker: words('Maker', 60),
	model: words('Model', 60),
	chemistry: z.enum(CHEMISTRIES).meta({ label: 'Chemistry' }),
	capacityAh: measure('Capacity', 'Ah', 5, 1_000),
	lengthMm: measure('Length', 'mm', 50, 1_500),
	widthMm: measure('Width', 'mm', 50, 1_000),
	heightMm: measure('Height', 'mm', 50, 1_000),
	massKg: measure('Mass', 'kg', 1, 200),
	internalResistanceMohm: measure('Internal resistance', 'mΩ', 0.1, 200),
	maxChargeA: measure('Highest charge current', 'A', 1, 1_000),
	sensor: cutOff(z.enum(SENSORS).meta({ label: 'What the BMS measures' })),
	chargeCutC: cutOff(measure('Charging stops at', '°C', 20, 120)),
	chargeResetC: cutOff(measure('Charging comes back at', '°C', 0, 119)),
	dischargeCutC: cutOff(measure('Goes dark at', '°C', 20, 120)),
	dischargeResetC: cutOff(measure('Comes back at', '°C', 0, 119)),
	cutDelayS: cutOff(measure('Delay before a cut-off', 's', 0, 3_600)),
	autoReset: cutOff(z.boolean().meta({ label: 'Comes back by itself' })),
	highestChargeC: heatLimit(measure('Highest temperature for charging', '°C', 20, 80)),
	highestUseC: heatLimit(measure('Highest temperature for use', '°C', 20, 90)),
	ratedLifeYears: heatLimit(measure('Rated life at 25 °C', 'years', 0.5, 30)),
	compensatesCharge: heatLimit(z.boolean().meta({ label: 'The charger compensates for temperature' })),
	underBonnet: z.enum(UNDER_BONNET_WORDS).meta({ label: 'What the maker says about under-bonnet use' }),
	underBonnetWords: optionalWords("The maker's own words", 500),
	dataSheet: optionalWords('Where that is written', 240)
});
type Fields = z.infer<typeof fields>;

const HEAT_FIELDS = [...CUT_OFF_FIELDS, ...HEAT_LIMIT_FIELDS] as const;
type HeatField = (typeof HEAT_FIELDS)[number];

/** Each kind of battery is asked for its own fields; a chemistry that is none is told of by itself. */
function isMissing(battery: Partial<Fields>, field: HeatField): boolean {
	const chemistry = findChemistry(battery.chemistry ?? '');
	if (chemistry === null || !heatFieldsOf(chemistry.key).includes(field)) return false;
	return battery[field] === null || battery[field] === undefined;
}

/** What a battery of its chemistry does not have is not kept. */
function keepOwnFields<T extends Fields>(battery: T): T {
	const own = heatFieldsOf(battery.chemistry);
	const others = HEAT_FIELDS.filter((field) => !own.includes(field));
	return { ...battery, ...Object.fromEntries(others.map((field) => [field, null])) };
}

/** Each reset must lie below its cut-off, or the latch would chatter. */
const LIMIT_PAIRS = [
	{ cut: 'chargeCutC', reset: 'chargeResetC', words: 'Charging comes back at' },
	{ cut: 'dischargeCutC', reset: 'dischargeResetC', words: 'Comes back at' }
] as const;

function checkLimits(battery: Fields, context: z.RefinementCtx): void {
	for (const { cut, reset, words: label } of LIMIT_PAIRS) {
		const [cutC, resetC] = [battery[cut], battery[reset]];
		if (cutC === null || resetC === null || resetC < cutC) continue;
		const message = `${label} must be below ${cutC} °C, where it stops.`;
		context.addIssue({ code: 'custom', path: [reset], message });
	}
	const { highestChargeC, highestUseC } = battery;
	if ((highestChargeC ?? -Infinity) <= (highestUseC ?? Infinity)) return;
	const message = `Highest temperature for charging must be at most ${highestUseC} °C, the highest for any use.`;
	context.addIssue({ code: 'custom', path: ['highestChargeC'], message });
}

/** What a maker is said to say must be quoted, with the place where it can be read. */
const QUOTES = [
	{ path: 'underBonnetWords', message: 'Copy what the maker says about under-bonnet use, word for word.' },
	{ path: 'dataSheet', message: 'Say where that is written: the document and its page.' }
] as const;

function checkQuotes(battery: Fields, context: z.RefinementCtx): void {
	if (battery.underBonnet === 'silent') return;
	for (const { path, message } of QUOTES) {
		if (battery[path] === '') context.addIssue({ code: 'custom', path: [path], message });
	}
}

const labelOf = (field: HeatField): string => metaOfField(fields.shape[field]).label ?? field;

/** What is missing is said together with whatever else is wrong. */
const ALWAYS = () => true;

/** The rules that go beyond one field. */
function withRules<S extends z.ZodType<Fields>>(schema: S): S {
	const asked = HEAT_FIELDS.reduce<S>(
		(ruled, field) =>
			ruled.refine((battery) => !isMissing(battery, field), {
				path: [field],
				error: `${labelOf(field)} is missing.`,
				when: ALWAYS
			}),
		schema
	);
	return asked.overwrite(keepOwnFields).superRefine(checkLimits).superRefine(checkQuotes);
}

export const batteryInputSchema = withRules(fields);
export type BatteryInput = z.infer<typeof batteryInputSchema>;

/** A change of a record, against the version that was seen. */
export const batteryChangeSchema = withRules(fields.extend({ version: versionSchema }));

export const batterySchema = editedSchema.extend(fields.shape);
export type BatteryView = z.infer<typeof batterySchema>;
