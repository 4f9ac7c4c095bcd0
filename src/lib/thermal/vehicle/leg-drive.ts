import { KELVIN_AT_ZERO_C } from '../correlations/radiation';
import { fifthRootOf } from '../solve/elementary';
import type { Leg, Scenario, Surface } from '../types';
import { sunWPerM2 } from './climate';
import { outsideTempC } from './measured-course';

const GRAVITY_M_PER_S2 = 9.80665;
const AIR_HEAT_J_PER_KG_K = 1006;
const AIR_GAS_J_PER_KG_K = 287.05;
const M_PER_S_PER_KM_PER_H = 1 / 3.6;

/** Rolling resistance coefficients; common practice, no source. */
export const ROLLING_RESISTANCE: Readonly<Record<Surface, number>> = {
	sealed: 0.012,
	gravel: 0.025,
	corrugated: 0.035,
	rock: 0.06,
	sand: 0.15
};

/** What a leg fixes for all of its length. */
export interface LegConstants {
	speedMPerS: number;
	/** Air through the radiator; 0 with the engine off. */
	flowM3PerS: number;
	radiatorWPerK: number;
	engineFilmWPerK: number;
	exhaustFilmWPerK: number;
	underWPerK: number;
	/** Film of the battery case, W/m²K. */
	caseFilmWPerM2K: number;
}

/** What the clock changes during a leg. */
export interface Drive {
	ambientC: number;
	skyC: number;
	sunWPerM2: number;
	fuelPowerW: number;
	gasTempC: number;
	gasWPerK: number;
	/** Heat that the air through the radiator carries, W/K. */
	airWPerK: number;
}

/** Films, flows and conductances that follow from the speed alone. */
export function findLegConstants(scenario: Scenario, leg: Leg): LegConstants {
	const { engine, exhaust, bay, position, battery } = scenario;
	const speedMPerS = leg.speedKmh * M_PER_S_PER_KM_PER_H;
	const root = Math.sqrt(speedMPerS);
	const flowM3PerS = leg.engineOn ? Math.min(bay.fanFlow + bay.flowPerSpeed * speedMPerS, bay.maxFlow) : 0;
	const radiator = Math.min(engine.radiatorStill + engine.radiatorPerSpeed * speedMPerS, engine.radiatorMax);
	return {
		speedMPerS,
		flowM3PerS,
		radiatorWPerK: flowM3PerS > 0 ? radiator : 0,
		engineFilmWPerK: (engine.filmStill + engine.filmPerSqrtSpeed * root) * engine.area,
		exhaustFilmWPerK: (exhaust.filmStill + exhaust.filmPerSqrtSpeed * root) * exhaust.area,
		underWPerK: engine.underStill + engine.underPerSpeed * speedMPerS,
		caseFilmWPerM2K:
			battery.filmStill + battery.filmPerSqrtSpeed * Math.sqrt(position.airExposure * speedMPerS)
	};
}

/**
 * Fuel power that the road, the climb, the air and the accessories ask for.
 *
 *     F = m g (Crr + grade) + ½ ρ (CdA + towCdA) v²
 *     Pbrake = max(F v, 0)/driveline + accessories
 *     Pfuel = min(idle + Pbrake/efficiency, rated), 0 with the engine off
 *
 * @param scenario vehicle group
 * @param leg engine, surface, gradePercent, towMassKg, towDragAreaM2
 * @param speedMPerS road speed, m/s
 * @param airDensityKgPerM3 density of the outside air, kg/m³
 * @returns fuel power, W
 * Validity: steady driving; braking and gear changes are not seen.
 * Source: common practice (road load equation), no source.
 * @example
 * const { vehicle, legs } = defaultScenario([{ minutes: 60, engineOn: true }]);
 * findFuelPowerW(vehicle, legs[0], 0, 1.2); // 17000
 */
export function findFuelPowerW(
	vehicle: Scenario['vehicle'],
	leg: Leg,
	speedMPerS: number,
	airDensityKgPerM3: number
): number {
	if (!leg.engineOn) return 0;
	const forceN = findForceN(vehicle, leg, speedMPerS, airDensityKgPerM3);
	const brakeW = Math.max(forceN * speedMPerS, 0) / vehicle.driveline + vehicle.accessoryPowerW;
	return Math.min(vehicle.idleFuelPowerW + brakeW / vehicle.brakeEfficiency, vehicle.ratedFuelPowerW);
}

/** What the road, the climb and the air hold against the vehicle; negative when it is pulled downhill. */
function findForceN(
	vehicle: Scenario['vehicle'],
	leg: Leg,
	speedMPerS: number,
	airDensityKgPerM3: number
): number {
	const weightN = (vehicle.massKg + leg.towMassKg) * GRAVITY_M_PER_S2;
	const rollN = weightN * (ROLLING_RESISTANCE[leg.surface] + leg.gradePercent / 100);
	const dragAreaM2 = vehicle.dragAreaM2 + leg.towDragAreaM2;
	return rollN + 0.5 * airDensityKgPerM3 * dragAreaM2 * speedMPerS * speedMPerS;
}

function findAirDensity({ pressurePa }: Scenario['climate'], ambientC: number): number {
	return pressurePa / (AIR_GAS_J_PER_KG_K * (ambientC + KELVIN_AT_ZERO_C));
}

/** Which of the limits of the fuel power holds: where it changes, the heats have a kink. */
export function findFuelRegime(
	scenario: Scenario,
	leg: Leg,
	{ speedMPerS }: LegConstants,
	hour: number
): 'pulled' | 'between' | 'rated' {
	const { vehicle, climate } = scenario;
	const density = findAirDensity(climate, outsideTempC(scenario, hour));
	if (findForceN(vehicle, leg, speedMPerS, density) <= 0) return 'pulled';
	const powerW = findFuelPowerW(vehicle, leg, speedMPerS, density);
	return powerW < vehicle.ratedFuelPowerW ? 'between' : 'rated';
}

/** Everything that the clock sets, written into `drive`. */
export function findDrive(
	scenario: Scenario,
	leg: Leg,
	constants: LegConstants,
	hour: number,
	drive: Drive
): Drive {
	drive.sunWPerM2 = sunWPerM2(hour, scenario.climate);
	return findUnlitDrive(scenario, leg, constants, hour, drive);
}

/** All of it but the sun, which is left as it stands. */
export function findUnlitDrive(
	scenario: Scenario,
	leg: Leg,
	constants: LegConstants,
	hour: number,
	drive: Drive
): Drive {
	const { vehicle, exhaust, climate } = scenario;
	const ambientC = outsideTempC(scenario, hour);
	const density = findAirDensity(climate, ambientC);
	drive.ambientC = ambientC;
	drive.skyC = ambientC - climate.skyDropK;
	drive.airWPerK = density * AIR_HEAT_J_PER_KG_K * constants.flowM3PerS;
	drive.fuelPowerW = findFuelPowerW(vehicle, leg, constants.speedMPerS, density);
	const load = drive.fuelPowerW / vehicle.ratedFuelPowerW;
	drive.gasTempC = exhaust.gasIdle + (exhaust.gasFull - exhaust.gasIdle) * Math.sqrt(load);
	const root = fifthRootOf(load);
	drive.gasWPerK = leg.engineOn ? exhaust.gasConductanceFull * root * root * root * root : 0;
	return drive;
}

export function emptyDrive(): Drive {
	return { ambientC: 0, skyC: 0, sunWPerM2: 0, fuelPowerW: 0, gasTempC: 0, gasWPerK: 0, airWPerK: 0 };
}
