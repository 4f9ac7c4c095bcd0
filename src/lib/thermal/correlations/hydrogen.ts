import { requirePositive, requireWithin } from './require';

/** Lead-acid and nickel-cadmium batteries that give off gas when charged. */
export type GassingBattery = 'vented lead-acid' | 'valve-regulated lead-acid' | 'nickel-cadmium';
export type ChargeMode = 'float' | 'boost';

/** Current that makes gas, mA for each Ah of rated capacity. */
const GASSING_MA_PER_AH: Readonly<Record<GassingBattery, Readonly<Record<ChargeMode, number>>>> = {
	'vented lead-acid': { float: 5, boost: 20 },
	'valve-regulated lead-acid': { float: 1, boost: 8 },
	'nickel-cadmium': { float: 5, boost: 50 }
};

/** Hydrogen of one Ah (0.42e-3 m³) times a dilution of 24 and a safety factor of 5: 0.0504, which the standards round. */
const AIR_M3_PER_AH = 0.05;

/**
 * Current that makes gas while a battery is charged.
 *
 * @param battery how it is built
 * @param mode float (kept full) or boost (charged quickly)
 * @returns mA for each Ah of rated capacity
 * Validity: lead-acid cells charged to 2.23 to 2.27 V (float) or 2.4 V (boost) a cell; a hotter or ageing battery makes more (voltages from memory).
 * Source: EN 50272-2:2001 / IEC 62485-2:2010, table of gas-producing currents.
 * @example
 * gassingCurrentMaPerAh('valve-regulated lead-acid', 'boost'); // 8
 */
export function gassingCurrentMaPerAh(battery: GassingBattery, mode: ChargeMode): number {
	return GASSING_MA_PER_AH[battery][mode];
}

/** A battery that gives off gas. */
export interface GassingCells {
	/** In series. */
	cells: number;
	gassingMaPerAh: number;
	capacityAh: number;
}

/**
 * Fresh air that keeps the hydrogen of a battery far from what can be lit.
 *
 *     Q = v q s n Igas C / 1000,   v q s = 24 × 0.42e-3 m³/Ah × 5, rounded to 0.05 m³/Ah
 *
 * @param battery cells in series, gas-producing current in mA/Ah, rated capacity in Ah
 * @returns Q, m³/h
 * @throws EngineInputError outside 1…200 cells, 0 < Igas ≤ 100 mA/Ah or 0 < C ≤ 5000 Ah
 * Validity: below 4 % hydrogen with a fivefold margin; a compartment open to people or flames asks for the local rules besides.
 * Source: EN 50272-2:2001 / IEC 62485-2:2010, ventilation.
 * @example
 * hydrogenAirFlowM3PerH({ cells: 6, gassingMaPerAh: 8, capacityAh: 100 }); // 0.24
 */
export function hydrogenAirFlowM3PerH({ cells, gassingMaPerAh, capacityAh }: GassingCells): number {
	requireWithin(1, 200, { cells });
	requirePositive({ gassingMaPerAh, capacityAh });
	requireWithin(0, 100, { gassingMaPerAh });
	requireWithin(0, 5000, { capacityAh });
	return (AIR_M3_PER_AH * cells * gassingMaPerAh * capacityAh) / 1000;
}

/**
 * Opening for the inflow, and another for the outflow, that lets the fresh air through by itself.
 *
 *     A = 28 Q      (A in cm², Q in m³/h)
 *
 * @param airFlowM3PerH Q, m³/h
 * @returns free area of each of the two openings, cm²
 * @throws EngineInputError when the flow is not above zero
 * Validity: natural draught of at least 0.1 m/s, openings on opposite sides or well apart, high and low.
 * Source: EN 50272-2:2001 / IEC 62485-2:2010, natural ventilation.
 * @example
 * ventOpeningCm2(0.24); // 6.72
 */
export function ventOpeningCm2(airFlowM3PerH: number): number {
	requirePositive({ airFlowM3PerH });
	return 28 * airFlowM3PerH;
}

/**
 * Distance from a vent of the battery within which nothing may spark or glow.
 *
 *     d = 28.8 ∛Igas ∛C      (d in mm)
 *
 * @param gassingMaPerAh Igas, mA/Ah
 * @param capacityAh C, Ah
 * @returns d, mm
 * @throws EngineInputError outside 0 < Igas ≤ 100 mA/Ah or 0 < C ≤ 5000 Ah
 * Validity: vents of single cells in still air; surfaces below 300 °C.
 * Source: EN 50272-2:2001 / IEC 62485-2:2010, close vicinity of the battery (formula from memory).
 * @example
 * sparkFreeDistanceMm(8, 100); // 267.36
 */
export function sparkFreeDistanceMm(gassingMaPerAh: number, capacityAh: number): number {
	requirePositive({ gassingMaPerAh, capacityAh });
	requireWithin(0, 100, { gassingMaPerAh });
	requireWithin(0, 5000, { capacityAh });
	return 28.8 * Math.cbrt(gassingMaPerAh) * Math.cbrt(capacityAh);
}

/**
 * Fresh air for a battery that drives a vehicle, by the standard for those.
 *
 *     Q = 0.05 n Igas C / 100      (Igas in A for each 100 Ah)
 *
 * @param cells n in series
 * @param gassingAPer100Ah 2 for vented and 1 for valve-regulated cells charged to a voltage limit, 5 to 7 for falling current
 * @param capacityAh C, Ah
 * @returns Q, m³/h
 * @throws EngineInputError outside 1…200 cells, 0 < Igas ≤ 10 A or 0 < C ≤ 5000 Ah
 * Validity: while charging, worst case.
 * Source: EN 50272-3:2002 / IEC 62485-3:2010, ventilation.
 * @example
 * tractionAirFlowM3PerH(6, 1, 100); // 0.3
 */
export function tractionAirFlowM3PerH(cells: number, gassingAPer100Ah: number, capacityAh: number): number {
	requireWithin(1, 200, { cells });
	requirePositive({ gassingAPer100Ah, capacityAh });
	requireWithin(0, 10, { gassingAPer100Ah });
	requireWithin(0, 5000, { capacityAh });
	return (AIR_M3_PER_AH * cells * gassingAPer100Ah * capacityAh) / 100;
}

/**
 * Fresh air by the charging current, as in Australian practice.
 *
 *     q = 0.006 n I      (q in L/s)
 *
 * @param cells n in series
 * @param chargeA charging current that the charger can force, A
 * @returns q, L/s
 * @throws EngineInputError outside 1…200 cells or 0 < I ≤ 1000 A
 * Validity: vented lead-acid cells under the charger's full current.
 * Source: AS/NZS 2676 and AS/NZS 3001.2 practice (read in a secondary page).
 * @example
 * chargingAirFlowLPerS(6, 25); // 0.9
 */
export function chargingAirFlowLPerS(cells: number, chargeA: number): number {
	requireWithin(1, 200, { cells });
	requirePositive({ chargeA });
	requireWithin(0, 1000, { chargeA });
	return 0.006 * cells * chargeA;
}
