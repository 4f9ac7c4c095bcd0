import { z } from 'zod';
import { HEAT_SOURCES, type DoneAssessment } from '../thermal/assess';
import { NODE_NAMES, SURFACES } from '../thermal/types';
import { LEG_KINDS } from './day-plans';
import { VERDICTS } from './verdicts';

const hour = z.number().meta({ description: 'Clock hour since midnight of the first day; runs on past 24' });
const tempC = z.number().meta({ description: '°C' });
const curve = z.array(z.number()).meta({ description: 'One value a step from the start' });
const curveC = z.array(z.number()).meta({ description: '°C, one value a step from the start' });

const [firstNode, ...otherNodes] = NODE_NAMES;
const nodesSchema = z
	.record(z.enum([firstNode, ...otherNodes]), tempC.nullable())
	.meta({ description: '°C by node; a shield that is not there is null' });

const spanSchema = z.object({
	fromHour: hour,
	toHour: hour,
	open: z.boolean().meta({ description: 'The run ended before it did' })
});

const eventSchema = z.object({
	side: z.enum(['charge', 'discharge']),
	kind: z.enum(['cut', 'reset']),
	hour
});

const legSchema = z.object({
	kind: z.enum(LEG_KINDS).optional(),
	fromHour: hour,
	toHour: hour,
	engineOn: z.boolean(),
	speedKmh: z.number(),
	surface: z.enum(SURFACES),
	bonnetOpen: z.boolean()
});

const hours = z.number().meta({ description: 'h' });
const volts = z.number().meta({ description: 'V' });

/** Of a battery that nothing switches off. */
const leadAcidSchema = z
	.object({
		useLimitC: tempC,
		chargeLimitC: tempC,
		tooHotAtHour: hour.nullable(),
		hoursAboveUseLimit: hours,
		hoursAboveChargeLimit: hours.meta({ description: 'How long it is charged above that limit, h' }),
		peakChargingC: tempC
			.nullable()
			.meta({ description: 'Hottest that it is charged at, °C; null without charge' }),
		chargerCompensates: z.boolean(),
		compensatedChargeV: volts.meta({ description: 'What the charger should give at the hottest, V' }),
		uncompensatedChargeV: volts.meta({ description: 'What it gives at 25 °C, V' }),
		freshAirM3PerH: z.number().meta({ description: 'For its hydrogen on boost charge by EN 50272-2, m³/h' }),
		openingCm2: z.number().meta({ description: 'Each of two openings, one low and one high, cm²' }),
		sparkFreeMm: z.number().meta({ description: 'No spark within this of its vents, mm' })
	})
	.meta({ description: 'Lead-acid alone: it has no BMS, never cuts out, and is judged by its limits' });

/** What the engine answered, for the API's document; the engine's own type is what holds. */
export const assessmentResultSchema = z.object({
	status: z.literal('done'),
	verdict: z.enum(VERDICTS),
	headroomK: z.number(),
	chargeHeadroomK: z.number(),
	cutAtHour: hour.nullable(),
	resetAtHour: hour.nullable(),
	backByItself: z.boolean(),
	darkSpans: z.array(spanSchema),
	darkHours: z.number(),
	chargeSpans: z.array(spanSchema),
	chargeMissedAh: z.number(),
	chargeMissedHours: z.number(),
	peakCellsC: tempC,
	peakAtHour: hour,
	peakSensorC: tempC,
	peaks: nodesSchema,
	end: nodesSchema,
	endSoc: z.number(),
	endHour: hour,
	events: z.array(eventSchema),
	ledger: z.array(z.object({ source: z.enum(HEAT_SOURCES), watts: z.number(), kelvin: z.number() })),
	curves: z.object({
		startHour: hour,
		stepMin: z.number(),
		ambientC: curveC,
		bayC: curveC,
		airC: curveC,
		caseC: curveC,
		cellsC: curveC,
		boardC: curveC,
		soc: curve
	}),
	legs: z.array(legSchema),
	engineVersion: z.string(),
	energyMaxRelativeImbalance: z.number(),
	steps: z.number().int(),
	evaluations: z.number().int(),
	hourly: z.array(z.record(z.string(), z.number().nullable())),
	leadAcid: leadAcidSchema.optional()
}) as unknown as z.ZodType<DoneAssessment, DoneAssessment>;
