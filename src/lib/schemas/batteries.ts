import { z } from 'zod';
import { SENSORS, type Sensor } from '../thermal/types';
import { editedSchema, measure, optionalWords, versionSchema, words } from './fields';

export type { Sensor };

export const CHEMISTRIES = ['lithium-iron-phosphate'] as const;
export type Chemistry = (typeof CHEMISTRIES)[number];

export const UNDER_BONNET_WORDS = ['allowed', 'conditional', 'silent', 'excluded'] as const;
export type UnderBonnetWord = (typeof UNDER_BONNET_WORDS)[number];

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
	sensor: z.enum(SENSORS).meta({ label: 'What the BMS measures' }),
	chargeCutC: measure('Charging stops at', '°C', 20, 120),
	chargeResetC: measure('Charging comes back at', '°C', 0, 119),
	dischargeCutC: measure('Goes dark at', '°C', 20, 120),
	dischargeResetC: measure('Comes back at', '°C', 0, 119),
	cutDelayS: measure('Delay before a cut-off', 's', 0, 3_600),
	autoReset: z.boolean().meta({ label: 'Comes back by itself' }),
	underBonnet: z.enum(UNDER_BONNET_WORDS).meta({ label: 'What the maker says about under-bonnet use' }),
	underBonnetWords: optionalWords("The maker's own words", 500),
	dataSheet: optionalWords('Where that is written', 240)
});

/** Each reset must lie below its cut-off, or the latch would chatter. */
const LIMIT_PAIRS = [
	{ cut: 'chargeCutC', reset: 'chargeResetC', words: 'Charging comes back at' },
	{ cut: 'dischargeCutC', reset: 'dischargeResetC', words: 'Comes back at' }
] as const;

function checkLimits(battery: z.infer<typeof fields>, context: z.RefinementCtx): void {
	for (const { cut, reset, words: label } of LIMIT_PAIRS) {
		if (battery[reset] >= battery[cut]) {
			context.addIssue({
				code: 'custom',
				path: [reset],
				message: `${label} must be below ${battery[cut]} °C, where it stops.`
			});
		}
	}
}

/** What a maker is said to say must be quoted, with the place where it can be read. */
const QUOTES = [
	{ path: 'underBonnetWords', message: 'Copy what the maker says about under-bonnet use, word for word.' },
	{ path: 'dataSheet', message: 'Say where that is written: the document and its page.' }
] as const;

function checkQuotes(battery: z.infer<typeof fields>, context: z.RefinementCtx): void {
	if (battery.underBonnet === 'silent') return;
	for (const { path, message } of QUOTES) {
		if (battery[path] === '') context.addIssue({ code: 'custom', path: [path], message });
	}
}

export const batteryInputSchema = fields.superRefine(checkLimits).superRefine(checkQuotes);
export type BatteryInput = z.infer<typeof batteryInputSchema>;

/** A change of a record, against the version that was seen. */
export const batteryChangeSchema = fields
	.extend({ version: versionSchema })
	.superRefine(checkLimits)
	.superRefine(checkQuotes);

export const batterySchema = editedSchema.extend(fields.shape);
export type BatteryView = z.infer<typeof batterySchema>;
