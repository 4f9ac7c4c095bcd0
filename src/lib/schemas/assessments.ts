import { z } from 'zod';
import type { Assessment } from '../thermal/assess';
import type { Derivation } from '../thermal/survey';
import type { ScenarioInput } from '../thermal/types';
import type { BatteryInput } from './batteries';
import type { DayPlanInput } from './day-plans';
import { idSchema, words } from './fields';
import type { PlaceInput } from './places';
import type { SurveyAnswers } from './survey';
import type { VehicleInput } from './vehicles';
import { VERDICTS } from './verdicts';

/** Everything that went into an assessment, as it was at that moment. */
export interface AssessmentInputs {
	jobNumber: number;
	customerName: string;
	vehicle: VehicleInput;
	battery: BatteryInput;
	mount: { letter: string; name: string; survey: SurveyAnswers };
	dayPlan: DayPlanInput;
	place: PlaceInput;
	/** The hot day that was planned for: the place's own figures unless the job changed them. */
	hotDay: { hotDayMaxC: number; dailyRangeK: number; sunPeakWPerM2: number };
	book: { number: number; name: string; coefficients: Record<string, Record<string, number>> };
	scenario: ScenarioInput;
	derivations: Derivation[];
}

/** What the engine answered, whole. */
export type AssessmentResult = Extract<Assessment, { status: 'done' }>;

export const assessRequestSchema = z.object({ mountId: idSchema });

export const assessmentRowSchema = z.object({
	id: z.number().int(),
	jobId: z.number().int(),
	mountId: z.number().int(),
	mountLetter: z.string(),
	mountName: z.string(),
	verdict: z.enum(VERDICTS),
	headroomK: z.number(),
	peakCellsC: z.number(),
	peakAtHour: z.number(),
	cutAtHour: z.number().nullable(),
	resetAtHour: z.number().nullable(),
	darkHours: z.number(),
	chargeMissedAh: z.number(),
	engineVersion: z.string(),
	bookNumber: z.number().int(),
	createdAt: z.iso.datetime()
});
export type AssessmentRow = z.infer<typeof assessmentRowSchema>;

/** Going ahead against "cuts out" takes a named person and a written reason. */
export const recommendationSchema = z.object({ assessmentId: idSchema });
export const overrideSchema = z.object({
	assessmentId: idSchema,
	decidedBy: words('Who decided', 120),
	reason: words('Reason', 1_000)
});
