import { describe } from 'vitest';
import {
	biot,
	chargingAirFlowLPerS,
	contactResistanceKPerW,
	filmResistanceKPerW,
	gassingCurrentMaPerAh,
	hydrogenAirFlowM3PerH,
	layerResistanceKPerW,
	parallelResistanceKPerW,
	planeWallRoot,
	planeWallShare,
	seriesResistanceKPerW,
	soakPeak,
	sparkFreeDistanceMm,
	timeToReach,
	tractionAirFlowM3PerH,
	twoBodyTimeConstantsS,
	ventOpeningCm2,
	waveResponse,
	type ChargeMode,
	type GassingBattery
} from '../../src/lib/thermal/correlations';
import { checkCases, type Formula } from './support/report-cases';

const airFlow = (battery: GassingBattery, mode: ChargeMode, cells: number, capacityAh: number) =>
	hydrogenAirFlowM3PerH({ cells, gassingMaPerAh: gassingCurrentMaPerAh(battery, mode), capacityAh });

const HYDROGEN: Record<string, Formula> = {
	'gassing current': gassingCurrentMaPerAh,
	'air flow': airFlow,
	opening: (battery: GassingBattery, mode: ChargeMode, cells: number, capacityAh: number) =>
		ventOpeningCm2(airFlow(battery, mode, cells, capacityAh)),
	traction: tractionAirFlowM3PerH,
	'by current': chargingAirFlowLPerS,
	distance: sparkFreeDistanceMm
};

/** A chip cooled by air on its own face and, through a joint and a plate, on the plate's: for one square metre. */
function chipTempC(
	fluxWPerM2: number,
	jointM2KPerW: number,
	plateM: number,
	conductivity: number,
	filmWPerM2K: number,
	airC: number
) {
	const film = filmResistanceKPerW(filmWPerM2K, 1);
	const through = seriesResistanceKPerW([
		contactResistanceKPerW(jointM2KPerW, 1),
		layerResistanceKPerW(plateM, conductivity, 1),
		film
	]);
	return airC + fluxWPerM2 * parallelResistanceKPerW([film, through]);
}

/** Thickness of insulation, mm, that lets a given heat through behind a layer of skin and a film of air and radiation. */
function insulationMm(
	bodyC: number,
	airC: number,
	heatW: number,
	areaM2: number,
	skinM: number,
	skinConductivity: number,
	conductivity: number,
	radiationWPerM2K: number,
	filmWPerM2K: number
) {
	const left =
		(bodyC - airC) / heatW -
		layerResistanceKPerW(skinM, skinConductivity, areaM2) -
		filmResistanceKPerW(radiationWPerM2K + filmWPerM2K, areaM2);
	return left / layerResistanceKPerW(0.001, conductivity, areaM2);
}

/** h, L, k, α, time, start and fluid of a wall. */
type Wall = [number, number, number, number, number, number, number];

function wallTempC(
	...[film, lengthM, conductivity, diffusivity, timeS, startC, fluidC, depthShare]: [...Wall, number]
) {
	const share = planeWallShare({
		biotNumber: biot(film, lengthM, conductivity),
		fourierNumber: (diffusivity * timeS) / lengthM ** 2,
		depthShare
	});
	return fluidC + share * (startC - fluidC);
}

const CONDUCTION: Record<string, Formula> = {
	chip: chipTempC,
	insulation: insulationMm,
	skin: (bodyC: number, heatW: number, skinM: number, conductivity: number, areaM2: number) =>
		bodyC - heatW * layerResistanceKPerW(skinM, conductivity, areaM2),
	layer: layerResistanceKPerW,
	biot,
	root: planeWallRoot,
	amplitude: (biotNumber: number) =>
		planeWallShare({ biotNumber, fourierNumber: 1, depthShare: 0 }) *
		Math.exp(planeWallRoot(biotNumber) ** 2),
	'wall temperature': wallTempC,
	'wall flux': (...wall: Wall) => wall[0] * (wallTempC(...wall, 1) - wall[6])
};

const LUMPED: Record<string, Formula> = {
	time: timeToReach,
	wave: (timeConstant: number, period: number, what: 'height' | 'lag') =>
		waveResponse(timeConstant, period)[what],
	soak: (
		surroundingsK: number,
		surroundingsTime: number,
		bodyK: number,
		bodyTime: number,
		what: 'excessK' | 'time'
	) => soakPeak({ surroundingsK, surroundingsTime, bodyK, bodyTime })[what],
	'two bodies': (capacities: [number, number], between: number, toAir: [number, number], which: 0 | 1) =>
		twoBodyTimeConstantsS(capacities, between, toAir)[which]
};

describe('fresh air for batteries against published values', () => checkCases('hydrogen', HYDROGEN));
describe('conduction against published values', () => checkCases('conduction', CONDUCTION));
describe('lumped bodies against closed forms', () => checkCases('lumped', LUMPED));
