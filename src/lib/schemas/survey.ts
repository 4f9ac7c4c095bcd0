import { z } from 'zod';
import {
	AIR_PATHS,
	BATTERY_SIDES,
	BAY_PLACES,
	BONNET_LININGS,
	COOLINGS,
	ENCLOSURE_AIRS,
	FACINGS,
	POSITION_KINDS,
	ROAD_HEATS,
	SHIELD_FINISHES,
	SHIELD_KINDS,
	SHIELD_PLACES,
	SUN_LOADS,
	SURVEY_FIELDS,
	TRAY_MATERIALS,
	TRAY_MATS,
	TRAY_UNDERSIDES,
	UNKNOWN,
	type ChoiceKey,
	type LengthKey,
	type PositionKind,
	type SurveyAnswers
} from '../thermal/survey';
import { measure } from './fields';

export type { PositionKind, SurveyAnswers };

export const positionKindSchema = z.enum(POSITION_KINDS).meta({ label: 'Where it would go' });

/** A number out of its limits says the limit; anything else is no number. */
function limitOf(issue: z.core.$ZodRawIssue): string | undefined {
	const failures = issue.code === 'invalid_union' ? issue.errors.flat() : [];
	return failures.find(({ code }) => code === 'too_small' || code === 'too_big')?.message;
}

/** A tape-measure reading, "unknown", or not yet answered. */
function reading(key: LengthKey) {
	const { label, minMm, maxMm } = SURVEY_FIELDS[key];
	return z
		.union([measure(label, 'mm', minMm, maxMm), z.literal(UNKNOWN)], {
			error: (issue) => limitOf(issue) ?? `${label} must be a number of mm.`
		})
		.optional()
		.meta({ label, unit: 'mm' });
}

/** One of the choices, "unknown", or not yet answered. */
function choice<const T extends readonly [string, ...string[]]>(key: ChoiceKey, choices: T) {
	const { label } = SURVEY_FIELDS[key];
	return z
		.union([z.enum(choices), z.literal(UNKNOWN)], { error: `${label}: choose one of the answers.` })
		.optional()
		.meta({ label });
}

export const surveyAnswersSchema = z.object({
	positionKind: positionKindSchema,
	bayPlace: choice('bayPlace', BAY_PLACES),
	exhaustFacing: choice('exhaustFacing', FACINGS),
	exhaustGapMm: reading('exhaustGapMm'),
	exhaustSeenWidthMm: reading('exhaustSeenWidthMm'),
	exhaustSeenHeightMm: reading('exhaustSeenHeightMm'),
	exhaustBatterySide: choice('exhaustBatterySide', BATTERY_SIDES),
	engineFacing: choice('engineFacing', FACINGS),
	engineGapMm: reading('engineGapMm'),
	engineSeenWidthMm: reading('engineSeenWidthMm'),
	engineSeenHeightMm: reading('engineSeenHeightMm'),
	engineBatterySide: choice('engineBatterySide', BATTERY_SIDES),
	bonnetGapMm: reading('bonnetGapMm'),
	bonnetLining: choice('bonnetLining', BONNET_LININGS),
	airPath: choice('airPath', AIR_PATHS),
	trayMaterial: choice('trayMaterial', TRAY_MATERIALS),
	trayLengthMm: reading('trayLengthMm'),
	trayWidthMm: reading('trayWidthMm'),
	trayThicknessMm: reading('trayThicknessMm'),
	trayMat: choice('trayMat', TRAY_MATS),
	trayUnderside: choice('trayUnderside', TRAY_UNDERSIDES),
	shieldKind: choice('shieldKind', SHIELD_KINDS),
	shieldPlace: choice('shieldPlace', SHIELD_PLACES),
	shieldFinish: choice('shieldFinish', SHIELD_FINISHES),
	shieldStandOffMm: reading('shieldStandOffMm'),
	enclosureCooling: choice('enclosureCooling', COOLINGS),
	enclosureSun: choice('enclosureSun', SUN_LOADS),
	enclosureAir: choice('enclosureAir', ENCLOSURE_AIRS),
	roadHeat: choice('roadHeat', ROAD_HEATS)
}) satisfies z.ZodType<SurveyAnswers>;
