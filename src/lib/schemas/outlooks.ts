import { z } from 'zod';
import type { Outlook } from '../thermal/outlook';
import { VERDICTS } from './verdicts';

export type { Outlook };

const tempC = z.number().meta({ description: '°C' });
const kelvin = z.number().meta({ description: 'K' });
const share = z.number().meta({ description: '0…1' });
const interval = z.object({ low: z.number(), high: z.number() });
const daysSchema = z
	.object({ low: z.number(), middle: z.number(), high: z.number() })
	.meta({ description: 'Expected days, with the range that holds four drawn vehicles in five' });

const bandSchema = z.object({
	startHour: z.number(),
	stepMin: z.number(),
	lowC: z.array(tempC).meta({ description: 'One day in twenty is cooler' }),
	lowerC: z.array(tempC),
	middleC: z.array(tempC),
	upperC: z.array(tempC),
	highC: z.array(tempC).meta({ description: 'One day in twenty is hotter' })
});

const setSchema = z.object({
	keys: z.array(z.string()),
	cost: z.number(),
	hours: z.number(),
	gainK: kelvin,
	headroomK: kelvin,
	verdict: z.enum(VERDICTS),
	cutOutShare: share.nullable()
});

/** What an estimate says beside its number, for the API's document; the engine's own type is what holds. */
export const outlookSchema = z.object({
	engineVersion: z.string(),
	seed: z.number().int(),
	day: z.object({
		samples: z.number().int(),
		seed: z.number().int(),
		cutOuts: z.number().int(),
		cutOutShare: share,
		shareInterval: interval,
		daysOfTwenty: z.number().int(),
		headroomLowK: kelvin,
		headroomMiddleK: kelvin,
		headroomHighK: kelvin,
		darkHoursHigh: z.number(),
		band: bandSchema,
		convergence: z.array(
			z.object({ samples: z.number().int(), cutOutShare: share, middleHeadroomK: kelvin })
		),
		hottest: z
			.object({ limitC: tempC, daysC: z.array(tempC) })
			.optional()
			.meta({ description: 'Fifty equally likely days against the limit, coolest first' })
	}),
	year: z.object({
		samples: z.number().int(),
		seed: z.number().int(),
		year: daysSchema,
		months: z.array(daysSchema),
		tenths: z
			.array(z.number())
			.optional()
			.meta({ description: 'Expected days a year of ten equally likely vehicles, fewest first' })
	}),
	influences: z.object({
		seed: z.number().int(),
		evaluations: z.number().int(),
		spreadK: kelvin,
		ranking: z.array(
			z.object({
				key: z.string(),
				label: z.string(),
				measure: z.string(),
				basis: z.string(),
				totalEffect: z.number(),
				standardError: z.number()
			})
		)
	}),
	remedies: z.object({
		moneyPerHour: z.number(),
		asPlanned: setSchema,
		alone: z.array(setSchema),
		front: z.array(setSchema),
		least: setSchema.nullable(),
		mostCutOutShare: share,
		tried: z.number().int(),
		notTried: z.array(z.string())
	}),
	envelope: z.object({
		samples: z.number().int(),
		seed: z.number().int(),
		triedC: z.tuple([tempC, tempC]),
		plannedHours: z.number(),
		plannedMaxC: tempC,
		points: z.array(
			z.object({
				driveHours: z.number(),
				middleC: tempC.nullable(),
				lowC: tempC.nullable(),
				highC: tempC.nullable()
			})
		)
	}),
	life: z
		.object({
			law: z.enum(['lithium-iron-phosphate', 'lead-acid', 'none']),
			takenOutAhPerYear: z.number(),
			hoursAbove45C: z.number(),
			years: z.array(z.object({ years: z.number(), low: z.number(), middle: z.number(), high: z.number() })),
			lifeYears: z.object({ low: z.number(), middle: z.number(), high: z.number() }).nullable(),
			beyondTests: z.array(z.string())
		})
		.nullable(),
	lifeProblem: z.string().nullable(),
	cable: z
		.object({
			airC: tempC,
			allowedA: z.number(),
			conductorC: tempC.nullable(),
			voltageDropV: z.number(),
			fuseRatingThereA: z.number(),
			protectsCable: z.boolean(),
			opensWithoutFault: z.boolean(),
			findings: z.array(
				z.object({
					check: z.string(),
					holds: z.boolean(),
					value: z.number(),
					limit: z.number(),
					unit: z.enum(['A', 'V'])
				})
			)
		})
		.nullable(),
	cableProblem: z.string().nullable()
}) as unknown as z.ZodType<Outlook, Outlook>;

/** How far the work on an outlook is. */
export const outlookProgressSchema = z.object({
	share: z.number(),
	part: z.enum(['day', 'year', 'influences', 'remedies', 'envelope', 'life'])
});
export type OutlookStep = z.infer<typeof outlookProgressSchema>['part'];
