import { z } from 'zod';
import { DAY_PLAN_TEMPLATES } from '../thermal/survey';
import { SURFACES, type Surface } from '../thermal/types';
import { LEG_KINDS, dayPlanInputSchema, type DayPlanInput, type LegKind } from './day-plans';
import { measure } from './fields';

export { DAY_PLAN_TEMPLATES };

export const LEG_KIND_LABELS: Record<LegKind, string> = {
	drive: 'Drive',
	crawl: 'Crawl',
	stop: 'Stop',
	camp: 'Camp'
};
export const SURFACE_LABELS: Record<Surface, string> = {
	sealed: 'Sealed',
	gravel: 'Gravel',
	corrugated: 'Corrugated',
	rock: 'Rock',
	sand: 'Sand'
};
export const LEG_KIND_CHOICES = LEG_KINDS.map((value) => ({ value, label: LEG_KIND_LABELS[value] }));
export const SURFACE_CHOICES = SURFACES.map((value) => ({ value, label: SURFACE_LABELS[value] }));

const CLOCK = /^\s*(\d{1,2})(?:[:.h ]?([0-5]\d))?\s*$/;

/** "7", "07:30", "7.30" and "0730" as hours of the day; null when it is no time of day. */
export function parseClock(text: string): number | null {
	const [, hours, minutes = '0'] = CLOCK.exec(text) ?? [];
	const hour = Number(hours) + Number(minutes) / 60;
	return hours !== undefined && hour < 24 ? hour : null;
}

/** The day as it is written in boxes: a clock, a percentage, and the legs. */
export const dayPlanFormSchema = dayPlanInputSchema.omit({ startHour: true, startSoc: true }).extend({
	startAt: z
		.string()
		.refine((text) => parseClock(text) !== null, { error: 'Starts at must be a time such as 07:30.' })
		.meta({ label: 'Starts at' }),
	startSocPercent: measure('State of charge at the start', '%', 0, 100)
});

export function planOfForm({
	startAt,
	startSocPercent,
	...rest
}: z.output<typeof dayPlanFormSchema>): DayPlanInput {
	return { ...rest, startHour: parseClock(startAt) ?? 0, startSoc: startSocPercent / 100 };
}
