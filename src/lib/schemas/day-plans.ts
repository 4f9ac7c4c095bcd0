import { z } from 'zod';
import { SURFACES } from '../thermal/types';
import { measure, versionSchema, words } from './fields';

export const LEG_KINDS = ['drive', 'crawl', 'stop', 'camp'] as const;
export type LegKind = (typeof LEG_KINDS)[number];

export const MAX_PLAN_LEGS = 48;

const legFields = z.object({
	kind: z.enum(LEG_KINDS).meta({ label: 'What happens' }),
	minutes: measure('Length', 'min', 1, 24 * 60),
	speedKmh: measure('Speed', 'km/h', 0, 200),
	surface: z.enum(SURFACES).meta({ label: 'Surface' }),
	gradePercent: measure('Average climb', '%', -30, 30),
	towing: z.boolean().meta({ label: 'Towing' }),
	engineOn: z.boolean().meta({ label: 'Engine running' }),
	bonnetOpen: z.boolean().meta({ label: 'Bonnet up' }),
	loadA: measure('Load', 'A', 0, 300)
});

export const STILL_KINDS: readonly LegKind[] = ['stop', 'camp'];

/** A leg must not say two things at once. */
export const planLegSchema = legFields.superRefine(({ kind, speedKmh, bonnetOpen }, context) => {
	const isStill = STILL_KINDS.includes(kind);
	if (isStill && speedKmh > 0) {
		const message = `Speed must be 0 km/h at a ${kind}.`;
		context.addIssue({ code: 'custom', path: ['speedKmh'], message });
	}
	if (!isStill && bonnetOpen) {
		const message = 'Bonnet up is for stops and camps only.';
		context.addIssue({ code: 'custom', path: ['bonnetOpen'], message });
	}
});
export type PlanLeg = z.infer<typeof planLegSchema>;

export const dayPlanInputSchema = z.object({
	name: words('Name of the day', 80),
	startHour: measure('Starts at', 'h', 0, 23.99),
	startSoc: z
		.number({ error: 'State of charge at the start must be a number.' })
		.min(0, { error: 'State of charge at the start must be at least 0.' })
		.max(1, { error: 'State of charge at the start must be at most 1.' })
		.meta({ label: 'State of charge at the start' }),
	chargerMaxA: measure('Charger', 'A', 0, 300),
	legs: z
		.array(planLegSchema)
		.min(1, { error: 'A day needs at least one leg.' })
		.max(MAX_PLAN_LEGS, { error: `A day has at most ${MAX_PLAN_LEGS} legs.` })
		.refine((legs) => legs.reduce((sum, leg) => sum + leg.minutes, 0) <= 3 * 24 * 60, {
			error: 'A day plan covers at most three days.'
		})
});
export type DayPlanInput = z.infer<typeof dayPlanInputSchema>;

export const dayPlanSchema = dayPlanInputSchema.extend({
	id: z.number().int(),
	version: versionSchema,
	jobId: z.number().int().nullable()
});
export type DayPlanView = z.infer<typeof dayPlanSchema>;
