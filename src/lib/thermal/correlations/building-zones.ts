import { drynessLimitMm, mean, requireMonthlyClimate, sum, type MonthlyClimate } from './monthly-climate';
import { requireNotBelow } from './require';

/** From the mildest to the coldest: the first limit of heating degree-days that is not exceeded gives the zone. */
const ZONES_BY_COLD = [
	{ zone: 3, upToHdd18: 2000 },
	{ zone: 4, upToHdd18: 3000 },
	{ zone: 5, upToHdd18: 4000 },
	{ zone: 6, upToHdd18: 5000 },
	{ zone: 7, upToHdd18: 7000 }
] as const;

/**
 * Thermal climate zone of the American building standards, 0 (extremely hot) to 8 (subarctic).
 *
 *     0 above 6000, 1 above 5000, 2 above 3500 cooling degree-days to 10 °C;
 *     else by heating degree-days to 18 °C: 3 to 2000, 4 to 3000, 5 to 4000, 6 to 5000, 7 to 7000, 8 beyond
 *
 * @param cdd10 cooling degree-days a year to 10 °C, K·d
 * @param hdd18 heating degree-days a year to 18 °C, K·d
 * @returns 0…8
 * @throws EngineInputError when a number is below zero
 * Validity: averages over years; the standard's own table by county decides where it lists a place.
 * Source: ANSI/ASHRAE Standard 169-2013, Table A-3 (limits of 90.1-2010 read, zone 0 and the split of zones 3 and 4 from memory).
 * @example
 * buildingThermalZone(1798, 3524); // 5
 */
export function buildingThermalZone(cdd10: number, hdd18: number): number {
	requireNotBelow(0, { cdd10, hdd18 });
	if (cdd10 > 6000) return 0;
	if (cdd10 > 5000) return 1;
	if (cdd10 > 3500) return 2;
	return ZONES_BY_COLD.find(({ upToHdd18 }) => hdd18 <= upToHdd18)?.zone ?? 8;
}

/** The standard that the moisture letter goes by: the later one minds the season of the rain. */
export type MoistureEdition = 2010 | 2013;

/**
 * Moisture letter of the American climate zones.
 *
 *     C marine: coldest month −3…18 °C, hottest below 22 °C, at least four months above 10 °C
 *     B dry:    yearly rain below 20 (T + 7) mm, T the yearly mean in °C; from 2013 below 20 (T + 14) where 70 % of it falls
 *               in summer, below 20 T where 70 % falls in winter
 *     A humid:  the rest
 *
 * @param climate twelve monthly means, °C, and rain, mm
 * @param edition which rule for dry
 * @returns A, B or C
 * @throws EngineInputError unless there are twelve months of temperatures within −80…50 °C and rain not below zero
 * Validity: zones 0 to 6; marine in zones 3 to 5 alone; the dry season that the marine letter asks for besides is left out.
 * Source: ANSI/ASHRAE/IES Standard 90.1-2010, Table B-4 (as a program has it); ANSI/ASHRAE Standard 169-2013, section A3
 *   (from memory).
 * @example
 * buildingMoistureLetter({ meanC: [5, 6, 8, 10, 13, 16, 18, 18, 16, 12, 8, 5], rainMm: [130, 90, 95, 70, 50, 40, 20, 25, 40, 90, 160, 150] }, 2010); // 'C'
 */
export function buildingMoistureLetter(climate: MonthlyClimate, edition: MoistureEdition): 'A' | 'B' | 'C' {
	requireMonthlyClimate(climate);
	const { meanC, rainMm } = climate;
	const coldestC = Math.min(...meanC);
	const warmMonths = meanC.filter((tempC) => tempC > 10).length;
	if (coldestC > -3 && coldestC < 18 && Math.max(...meanC) < 22 && warmMonths >= 4) return 'C';
	const limitMm = edition === 2010 ? 20 * (mean(meanC) + 7) : drynessLimitMm(climate);
	return sum(rainMm) < limitMm ? 'B' : 'A';
}

/** What the Australian climate zones go by. */
export interface AustralianPlace {
	/** Mean of the daily highest in January, °C. */
	januaryMaxC: number;
	/** Mean water vapour pressure at three in the afternoon in January, kPa. */
	januaryVapourKPa: number;
	/** Mean temperature of July, °C. */
	julyMeanC: number;
	/** Heating degree-days a year to 18 °C, K·d. */
	hdd18: number;
	/** Within an alpine area as declared. */
	alpine: boolean;
}

/**
 * Climate zone of the Australian construction code, 1 (hot and humid) to 8 (alpine).
 *
 *     8 alpine;  1 January from 30 °C and from 2.1 kPa;  2 below 30 °C and from 2.1 kPa
 *     3 from 30 °C and drier, July from 14 °C;  4 July below 14 °C
 *     below 30 °C and drier by heating degree-days:  5 below 1000, 6 below 2000, 7 from 2000
 *
 * @param place January's highest in °C and vapour pressure in kPa, July's mean in °C, degree-days and whether it is alpine
 * @returns 1…8
 * @throws EngineInputError when a temperature is below −50 °C, or a pressure or number of degree-days below zero
 * Validity: averages over years. The code's own map, drawn along council boundaries, decides: Alice Springs, which these rules
 *   put into 4, stands in zone 3 there (from memory).
 * Source: National Construction Code, climate zone map, by the rules of the weather bureau's map that it was drawn from.
 * @example
 * australianClimateZone({ januaryMaxC: 26, januaryVapourKPa: 1.3, julyMeanC: 10, hdd18: 1500, alpine: false }); // 6
 */
export function australianClimateZone(place: AustralianPlace): number {
	const { januaryMaxC, januaryVapourKPa, julyMeanC, hdd18, alpine } = place;
	requireNotBelow(-50, { januaryMaxC, julyMeanC });
	requireNotBelow(0, { januaryVapourKPa, hdd18 });
	if (alpine) return 8;
	const hot = januaryMaxC >= 30;
	if (januaryVapourKPa >= 2.1) return hot ? 1 : 2;
	if (hot) return julyMeanC >= 14 ? 3 : 4;
	if (hdd18 < 1000) return 5;
	return hdd18 < 2000 ? 6 : 7;
}
