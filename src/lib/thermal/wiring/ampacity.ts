import { EngineInputError, requireNotBelow, requirePositive, requireWithin } from '../correlations/require';
import { copperWarmth } from './copper';
import { interpolateLog } from './interpolate-log';

/** How warm an insulation may be for years, °C. */
export const INSULATION_CLASSES_C = [70, 90, 105, 125] as const;
export type InsulationC = (typeof INSULATION_CLASSES_C)[number];

/** In a tube or a corrugated hose, or open to the air around it. */
export type Laying = 'in a tube' | 'in free air';

/** Current that two loaded copper conductors bear for years in air of 30 °C: mm², then A at 70 °C and at 90 °C. */
const TUBE: readonly (readonly [number, number, number])[] = [
	[1.5, 17.5, 23],
	[2.5, 24, 31],
	[4, 32, 42],
	[6, 41, 54],
	[10, 57, 75],
	[16, 76, 100],
	[25, 101, 133],
	[35, 125, 164],
	[50, 151, 198],
	[70, 192, 253],
	[95, 232, 306],
	[120, 269, 354]
];
const FREE_AIR: readonly (readonly [number, number, number])[] = [
	[1.5, 22, 26],
	[2.5, 30, 36],
	[4, 40, 49],
	[6, 51, 63],
	[10, 70, 86],
	[16, 94, 115],
	[25, 119, 149],
	[35, 148, 185],
	[50, 180, 225],
	[70, 232, 289],
	[95, 282, 352],
	[120, 328, 410]
];
const TABLE_AIR_C = 30;
const HOTTEST_TABLE_C = 90;

const COLUMNS = {
	'in a tube': [
		TUBE.map(([area, at70]) => [area, at70] as const),
		TUBE.map(([area, , at90]) => [area, at90] as const)
	],
	'in free air': [
		FREE_AIR.map(([area, at70]) => [area, at70] as const),
		FREE_AIR.map(([area, , at90]) => [area, at90] as const)
	]
} as const;

/**
 * What is left of a cable's current when the air around it is warmer than its table says.
 *
 *     f = √[ (Tmax − Tair)/(Tmax − Tref) ],  0 where the air is as warm as the insulation may be
 *
 * @param insulationC how warm the conductor may be, °C
 * @param airC air around the cable, °C
 * @param referenceC air that the table was made for, °C, below the first
 * @returns current over current of the table, without unit
 * @throws EngineInputError when the reference is not below what the conductor may be, or the air below −60 °C
 * Validity: steady current; the resistance at the limit is the same, the film's growth with temperature is left out.
 * Source: IEC 60287-1-1, 1.4, without dielectric loss and sun; the factors of IEC 60364-5-52 Table B.52.14 follow it.
 * @example
 * ambientFactor(70, 50, 30); // 0.70711
 */
export function ambientFactor(insulationC: number, airC: number, referenceC: number): number {
	requireNotBelow(-60, { airC, referenceC });
	if (!(referenceC < insulationC)) {
		throw new EngineInputError(
			'referenceC',
			referenceC,
			`below the ${insulationC} that the conductor may be`
		);
	}
	return Math.sqrt(Math.max(0, (insulationC - airC) / (insulationC - referenceC)));
}

/**
 * Current that a cable bears for years in air of 30 °C.
 *
 *     70 and 90 °C: from the tables;  hotter: I₉₀ √[ (Tmax − 30)/(90 − 30) · R(90)/R(Tmax) ]
 *
 * @param areaMm2 cross-section of flexible copper, mm², 1.5 to 120
 * @param insulationC class of the insulation: 70, 90, 105 or 125 °C
 * @param laying in a tube or in free air
 * @returns current, A
 * @throws EngineInputError outside 1.5 to 120 mm² or for another class
 * Validity: one circuit of two conductors, no bundle beside it; between sections straight in logarithms.
 * Source: IEC 60364-5-52:2009, Tables B.52.2, B.52.3 (method B1), B.52.10 and B.52.12 (method E), from memory; IEC 60287-1-1 for
 * hotter insulation.
 * @example
 * tableAmpacityA(25, 90, 'in free air'); // 149
 */
export function tableAmpacityA(areaMm2: number, insulationC: InsulationC, laying: Laying): number {
	if (!INSULATION_CLASSES_C.includes(insulationC)) {
		throw new EngineInputError('insulationC', insulationC, `one of ${INSULATION_CLASSES_C.join(', ')}`);
	}
	const [at70, at90] = COLUMNS[laying];
	if (insulationC === 70) return interpolateLog(at70, { areaMm2 });
	const atTable = interpolateLog(at90, { areaMm2 });
	const heat = (insulationC - TABLE_AIR_C) / (HOTTEST_TABLE_C - TABLE_AIR_C);
	return atTable * Math.sqrt((heat * copperWarmth(HOTTEST_TABLE_C)) / copperWarmth(insulationC));
}

/**
 * Current that a cable bears for years in air of any temperature.
 *
 *     I = I₃₀ √[ (Tmax − Tair)/(Tmax − 30) ]
 *
 * @param areaMm2 cross-section of flexible copper, mm², 1.5 to 120
 * @param insulationC class of the insulation: 70, 90, 105 or 125 °C
 * @param laying in a tube or in free air
 * @param airC air around the cable, °C
 * @returns current, A; 0 where the air is as warm as the insulation may be
 * @throws EngineInputError outside 1.5 to 120 mm², for another class, or for air below −60 °C
 * Validity, Source: as tableAmpacityA and ambientFactor.
 * @example
 * ampacityA(25, 90, 'in free air', 60); // 105.36
 */
export function ampacityA(areaMm2: number, insulationC: InsulationC, laying: Laying, airC: number): number {
	return tableAmpacityA(areaMm2, insulationC, laying) * ambientFactor(insulationC, airC, TABLE_AIR_C);
}

/**
 * How warm a conductor becomes when it carries a current for long.
 *
 *     T = Tair + (Tmax − Tair)(I/Iz)²      (Iz: what it may carry at that air)
 *
 * @param currentA current, A, not below zero
 * @param allowedA what the cable may carry at that air, A, above zero
 * @param insulationC how warm the conductor may be, °C
 * @param airC air around the cable, °C
 * @returns temperature of the conductor, °C
 * @throws EngineInputError when a current is below its limit or the air warmer than the insulation may be
 * Validity: about the limit; far from it the change of resistance and film makes some kelvin.
 * Source: IEC 60287-1-1, 1.4, as a ratio.
 * @example
 * conductorTempC(50, 100, 90, 40); // 52.5
 */
export function conductorTempC(
	currentA: number,
	allowedA: number,
	insulationC: number,
	airC: number
): number {
	requireNotBelow(0, { currentA });
	requirePositive({ allowedA });
	requireWithin(-60, insulationC, { airC });
	return airC + (insulationC - airC) * (currentA / allowedA) ** 2;
}
