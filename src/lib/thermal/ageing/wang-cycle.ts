import { KELVIN_AT_ZERO_C } from '../correlations/radiation';
import { requireNotBelow, requirePositive } from '../correlations/require';
import { requireTested, type TestedRange } from './tested-range';

/** Fitted factors B by C-rate. */
const FACTORS: readonly (readonly [number, number])[] = [
	[0.5, 31630],
	[2, 21681],
	[6, 12934],
	[10, 15512]
];
const EXPONENT = 0.55;
/** J/mol K, rounded as in the fit: the whole exponent is near 13, and more digits would shift the law by 0.07 %. */
const GAS_CONSTANT = 8.314;
const ACTIVATION_J_PER_MOL = 31700;
const ACTIVATION_PER_C_RATE = 370.3;
/** Capacity of the tested cell by which its throughput is scaled. */
const CELL_AH = 2;

export const WANG_TESTED: TestedRange = { tempC: [0, 60], cRate: [0, 10] };

/**
 * Factor B of Wang's law: straight lines between the fitted rates.
 *
 *     B = 31630 (C/2), 21681 (2C), 12934 (6C), 15512 (10C)
 *
 * @param cRate discharge current over capacity, 1/h; below C/2 the factor of C/2 is held
 * @returns B, without unit
 * @throws EngineInputError outside 0 to 10
 * Validity: C/2 to 10C; below it the least tested rate stands in.
 * Source: Wang et al., J. Power Sources 196 (2011) 3942, Table 3 (numbers read in public implementations).
 * @example
 * wangFactor(1.25); // 26655.5
 */
export function wangFactor(cRate: number): number {
	requireTested(WANG_TESTED, { cRate });
	const above = FACTORS.findIndex(([rate]) => rate >= cRate);
	const [highRate, highFactor] = FACTORS[above]!;
	const [lowRate, lowFactor] = FACTORS[above - 1] ?? [highRate - 1, highFactor];
	return lowFactor + ((cRate - lowRate) / (highRate - lowRate)) * (highFactor - lowFactor);
}

/** B exp(−Ea/RT)/100 wherever the temperature lies. */
export function wangRate(tempC: number, cRate: number): number {
	const activation = ACTIVATION_J_PER_MOL - ACTIVATION_PER_C_RATE * Math.max(cRate, FACTORS[0]![0]);
	return (wangFactor(cRate) * Math.exp(-activation / (GAS_CONSTANT * (tempC + KELVIN_AT_ZERO_C)))) / 100;
}

/**
 * Capacity that cycling takes from lithium iron phosphate cells.
 *
 *     loss = B exp[ −(31700 − 370.3 C)/(R T) ] Ah^0.55 / 100      (T in kelvin)
 *
 * @param tempC cell temperature, °C
 * @param cRate discharge current over capacity, 1/h; below C/2 the law of C/2 is held
 * @param cellAh charge taken out of one cell of 2 Ah, Ah
 * @returns lost share of the capacity, 0…1
 * @throws EngineInputError outside 0 to 60 °C or 0 to 10 C, or when the charge is below zero
 * Validity: graphite/LiFePO4 26650 cells, 0 to 60 °C tested (15 to 60 °C fitted, from memory), C/2 to 10C.
 * Source: Wang, Liu, Hicks-Garner et al., J. Power Sources 196 (2011) 3942–3948, eq. 7.
 * @example
 * wangCapacityLoss(45, 0.5, 1000); // 0.09456
 */
export function wangCapacityLoss(tempC: number, cRate: number, cellAh: number): number {
	requireTested(WANG_TESTED, { tempC, cRate });
	requireNotBelow(0, { cellAh });
	return wangRate(tempC, cRate) * cellAh ** EXPONENT;
}

/**
 * Charge that a cell can give before a share of its capacity is gone: Wang's law the other way round.
 *
 *     Ah = (loss / rate)^(1/0.55)
 *
 * @param tempC cell temperature, °C
 * @param cRate discharge current over capacity, 1/h
 * @param loss lost share of the capacity, 0…1
 * @returns charge out of one cell of 2 Ah, Ah
 * @throws EngineInputError outside 0 to 60 °C or 0 to 10 C, or when the loss is below zero
 * Validity, Source: as wangCapacityLoss.
 * @example
 * wangThroughputAh(25, 0.5, 0.2); // 16693
 */
export function wangThroughputAh(tempC: number, cRate: number, loss: number): number {
	requireTested(WANG_TESTED, { tempC, cRate });
	requireNotBelow(0, { loss });
	return (loss / wangRate(tempC, cRate)) ** (1 / EXPONENT);
}

/**
 * Charge through one of Wang's cells that matches the charge through a pack: as many full capacities.
 *
 *     Ah(cell) = Ah(pack) · 2 / C(pack)
 *
 * @param packAh charge taken out of the pack, Ah
 * @param capacityAh capacity of the pack, Ah, above zero
 * @returns charge out of one cell of 2 Ah, Ah
 * @throws EngineInputError when the charge is below zero or the capacity not above zero
 * Validity: 2 Ah is the derated capacity that the tests used; the nominal 2.2 Ah would give a tenth more.
 * Source: Wang et al. 2011, section 2 (cell of 2.2 Ah nominal).
 * @example
 * wangCellAh(16000, 130); // 246.15
 */
export function wangCellAh(packAh: number, capacityAh: number): number {
	requireNotBelow(0, { packAh });
	requirePositive({ capacityAh });
	return (packAh * CELL_AH) / capacityAh;
}

/** Exponent of the charge, by which changing temperatures are put together. */
export const WANG_EXPONENT = EXPONENT;
