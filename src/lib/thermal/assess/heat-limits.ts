import { chargeVoltageV } from '../chemistries/charge-voltage';
import { findGasNeeds } from '../chemistries/gas';
import type { HeatLimits } from '../chemistries/guard';
import type { MinuteSeries, Scenario } from '../types';
import type { LeadAcidFigures } from './types';

const MINUTES_PER_H = 60;
const CHARGER_REFERENCE_C = 25;
const NO_GAS = { freshAirM3PerH: 0, openingCm2: 0, sparkFreeMm: 0 };

/** Minutes of the grid on which something holds; the last grid point has no minute after it. */
function listMinutes({ count }: MinuteSeries, holds: (minute: number) => boolean): number[] {
	const minutes: number[] = [];
	for (let minute = 0; minute + 1 < count; minute++) if (holds(minute)) minutes.push(minute);
	return minutes;
}

function findPeakC(cells: Float64Array, count: number): number {
	let peakC = -Infinity;
	for (let minute = 0; minute < count; minute++) peakC = Math.max(peakC, cells[minute]!);
	return peakC;
}

/**
 * What a day does to a battery that nothing switches off, and what it asks of its charger and its place.
 *
 * @param scenario the day as it was run
 * @param minutes the run on the grid of minutes
 * @param limits highest temperatures of use and charging, °C
 * @returns hours above each limit, charging voltages, fresh air and openings
 * @throws EngineInputError when the capacity is above 5000 Ah
 * Validity: charging goes on at any temperature, as an alternator without a sensor does it.
 * Source: as chargeVoltageV and findGasNeeds.
 * @example
 * const scenario = defaultScenario([{ minutes: 60 }]);
 * const limits = { chemistry: 'lead-acid-agm', highestUseC: 60, highestChargeC: 50, ratedLifeYears: 6, compensatesCharge: true };
 * weighHeat(scenario, runScenario(scenario).minutes, limits).hoursAboveUseLimit; // 0
 */
export function weighHeat({ battery }: Scenario, minutes: MinuteSeries, limits: HeatLimits): LeadAcidFigures {
	const { chemistry, highestUseC: useLimitC, highestChargeC: chargeLimitC } = limits;
	const { cells } = minutes.nodes;
	const tooHot = listMinutes(minutes, (minute) => cells[minute]! > useLimitC);
	const charged = listMinutes(minutes, (minute) => minutes.currentA[minute]! > 0);
	const chargedHot = charged.filter((minute) => cells[minute]! > chargeLimitC);
	const [first] = tooHot;
	const { freshAirM3PerH, openingCm2, sparkFreeMm } = findGasNeeds(chemistry, battery.capacityAh) ?? NO_GAS;
	return {
		...{ useLimitC, chargeLimitC },
		tooHotAtHour: first === undefined ? null : minutes.startHour + first / MINUTES_PER_H,
		hoursAboveUseLimit: tooHot.length / MINUTES_PER_H,
		hoursAboveChargeLimit: chargedHot.length / MINUTES_PER_H,
		peakChargingC: charged.length === 0 ? null : Math.max(...charged.map((minute) => cells[minute]!)),
		chargerCompensates: limits.compensatesCharge,
		compensatedChargeV: chargeVoltageV(chemistry, findPeakC(cells, minutes.count)),
		uncompensatedChargeV: chargeVoltageV(chemistry, CHARGER_REFERENCE_C),
		...{ freshAirM3PerH, openingCm2, sparkFreeMm }
	};
}

/** Below the limit by so much, a battery that was too hot counts as cool again. */
const COOLED_K = 1;

/**
 * A day on which passing the limit of use counts as a cut-off: for whoever counts such days or looks for their edge.
 *
 * @param scenario the day of a battery that nothing switches off
 * @param limits highest temperature of use, °C
 * @returns the same day with the limit in the place of the cut-off; a battery with a BMS, without limits, as it is
 * Validity: from the moment on which the limit is passed its loads are not drawn, which moves the peak by little; up to
 *   that moment the day is the same.
 * Source: our own.
 * @example
 * const limits = { kind: 'heat-limits', chemistry: 'lead-acid-agm', highestChargeC: 50, highestUseC: 60, ratedLifeYears: 6, compensatesCharge: true };
 * watchUseLimit(defaultScenario([{ minutes: 60 }]), limits).bms.discharge.cut; // 60
 */
export function watchUseLimit(scenario: Scenario, limits: HeatLimits | null): Scenario {
	if (limits === null) return scenario;
	const cut = limits.highestUseC;
	return { ...scenario, bms: { ...scenario.bms, discharge: { cut, reset: cut - COOLED_K } } };
}
