import type { BatterySide, SurveyedBattery } from './types';

/** A battery as a box, m and m². */
export interface BatteryShape {
	lengthM: number;
	widthM: number;
	heightM: number;
	baseAreaM2: number;
	/** Four sides and the top: the base stands on the tray and exchanges heat through it. */
	caseAreaM2: number;
	sideAreaM2: Record<BatterySide, number>;
	aroundAreaM2: number;
}

/**
 * Surfaces of a battery from its three dimensions.
 *
 *     case area = L W + 2 H (L + W)
 *
 * @param battery length, width and height, mm
 * @returns lengths in m, areas in m²; the longer of length and width is the long side
 * Validity: a box; handles and ribs are passed over.
 * Source: geometry.
 * @example
 * measureBattery({ lengthMm: 330, widthMm: 172, heightMm: 215 }).caseAreaM2 // 0.27262
 */
export function measureBattery(
	battery: Pick<SurveyedBattery, 'lengthMm' | 'widthMm' | 'heightMm'>
): BatteryShape {
	// The longer side is the long side, whichever way round the data sheet names them.
	const lengthM = Math.max(battery.lengthMm, battery.widthMm) / 1000;
	const widthM = Math.min(battery.lengthMm, battery.widthMm) / 1000;
	const heightM = battery.heightMm / 1000;
	const baseAreaM2 = lengthM * widthM;
	const aroundAreaM2 = 2 * heightM * (lengthM + widthM);
	return {
		lengthM,
		widthM,
		heightM,
		baseAreaM2,
		caseAreaM2: baseAreaM2 + aroundAreaM2,
		sideAreaM2: { 'long-side': lengthM * heightM, end: widthM * heightM, top: baseAreaM2, base: baseAreaM2 },
		aroundAreaM2
	};
}
