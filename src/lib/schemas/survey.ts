import { z } from 'zod';
import {
	AIR_PATHS,
	BATTERY_SIDES,
	BAY_PLACES,
	BONNET_LININGS,
	COOLINGS,
	ENCLOSURE_AIRS,
	FACINGS,
	LENGTH_LIMITS_MM,
	POSITION_KINDS,
	ROAD_HEATS,
	SHIELD_FINISHES,
	SHIELD_KINDS,
	SHIELD_PLACES,
	SUN_LOADS,
	TRAY_MATERIALS,
	TRAY_MATS,
	TRAY_UNDERSIDES,
	UNKNOWN,
	type LengthKey,
	type PositionKind,
	type SurveyAnswers
} from '../thermal/survey';
import { measure } from './fields';

export type { PositionKind, SurveyAnswers };

export const positionKindSchema = z.enum(POSITION_KINDS).meta({ label: 'Where it would go' });

/** A tape-measure reading, "unknown", or not yet answered. */
function reading(key: LengthKey) {
	const { label, min, max } = LENGTH_LIMITS_MM[key];
	return z
		.union([measure(label, 'mm', min, max), z.literal(UNKNOWN)], {
			error: `${label} must be a number of mm.`
		})
		.optional()
		.meta({ label, unit: 'mm' });
}

/** One of the choices, "unknown", or not yet answered. */
function choice<const T extends readonly [string, ...string[]]>(label: string, choices: T) {
	return z
		.union([z.enum(choices), z.literal(UNKNOWN)], { error: `${label}: choose one of the answers.` })
		.optional()
		.meta({ label });
}

export const surveyAnswersSchema = z.object({
	positionKind: positionKindSchema,
	bayPlace: choice('Where in the bay', BAY_PLACES),
	exhaustFacing: choice('How the exhaust faces the battery', FACINGS),
	exhaustGapMm: reading('exhaustGapMm'),
	exhaustSeenWidthMm: reading('exhaustSeenWidthMm'),
	exhaustSeenHeightMm: reading('exhaustSeenHeightMm'),
	exhaustBatterySide: choice('Side of the battery towards the exhaust', BATTERY_SIDES),
	engineFacing: choice('How the engine faces the battery', FACINGS),
	engineGapMm: reading('engineGapMm'),
	engineSeenWidthMm: reading('engineSeenWidthMm'),
	engineSeenHeightMm: reading('engineSeenHeightMm'),
	engineBatterySide: choice('Side of the battery towards the engine', BATTERY_SIDES),
	bonnetGapMm: reading('bonnetGapMm'),
	bonnetLining: choice('Under the bonnet panel', BONNET_LININGS),
	airPath: choice('Air around the battery', AIR_PATHS),
	trayMaterial: choice('Tray material', TRAY_MATERIALS),
	trayLengthMm: reading('trayLengthMm'),
	trayWidthMm: reading('trayWidthMm'),
	trayThicknessMm: reading('trayThicknessMm'),
	trayMat: choice('Between battery and tray', TRAY_MATS),
	trayUnderside: choice('Under the tray', TRAY_UNDERSIDES),
	shieldKind: choice('Heat shield', SHIELD_KINDS),
	shieldPlace: choice('Sides that the shield covers', SHIELD_PLACES),
	shieldFinish: choice('Finish of the shield', SHIELD_FINISHES),
	shieldStandOffMm: reading('shieldStandOffMm'),
	enclosureCooling: choice('Cooling inside', COOLINGS),
	enclosureSun: choice('Sun on it', SUN_LOADS),
	enclosureAir: choice('Air exchange', ENCLOSURE_AIRS),
	roadHeat: choice('Heat from the road', ROAD_HEATS)
}) satisfies z.ZodType<SurveyAnswers>;
