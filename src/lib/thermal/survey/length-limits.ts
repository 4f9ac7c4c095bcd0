import type { SurveyKey } from './types';

/** The survey's lengths: what a tape measure can sensibly read there, mm. */
export const LENGTH_LIMITS_MM = {
	exhaustGapMm: { min: 10, max: 2000, label: 'Gap to the exhaust' },
	exhaustSeenWidthMm: { min: 10, max: 1500, label: 'Width of the exhaust that the battery sees' },
	exhaustSeenHeightMm: { min: 10, max: 1000, label: 'Height of the exhaust that the battery sees' },
	engineGapMm: { min: 10, max: 2000, label: 'Gap to the engine' },
	engineSeenWidthMm: { min: 10, max: 1500, label: 'Width of the engine that the battery sees' },
	engineSeenHeightMm: { min: 10, max: 1000, label: 'Height of the engine that the battery sees' },
	bonnetGapMm: { min: 5, max: 1000, label: 'Gap up to the bonnet' },
	trayLengthMm: { min: 50, max: 2000, label: 'Length of the tray' },
	trayWidthMm: { min: 50, max: 1500, label: 'Width of the tray' },
	trayThicknessMm: { min: 0.5, max: 30, label: 'Thickness of the tray' },
	shieldStandOffMm: { min: 1, max: 200, label: 'Gap between plate and battery' }
} as const satisfies Partial<Record<SurveyKey, { min: number; max: number; label: string }>>;
export type LengthKey = keyof typeof LENGTH_LIMITS_MM;
