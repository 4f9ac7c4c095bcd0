import { describe } from 'vitest';
import {
	criticalPlateLengthM,
	filmCoefficientWPerM2K,
	horizontalPlateLengthM,
	nusseltCylinderAllSpeeds,
	nusseltCylinderBanded,
	nusseltHorizontalCylinder,
	nusseltHorizontalCylinderBanded,
	nusseltHorizontalPlate,
	nusseltHorizontalPlateAllFluids,
	nusseltNaturalSphere,
	nusseltPlateLaminar,
	nusseltPlateLaminarAllPrandtl,
	nusseltPlateMixed,
	nusseltPlateTurbulent,
	nusseltPlateTurbulentKreith,
	nusseltSphere,
	nusseltVerticalPlate,
	nusseltVerticalPlateLaminar,
	radiateBetween,
	rayleigh,
	reynolds,
	type PlateFace
} from '../../src/lib/thermal/correlations';
import { CRITICAL_REYNOLDS } from '../../src/lib/thermal/correlations/forced-plate';
import { checkCases, type Formula } from './support/report-cases';

const film = filmCoefficientWPerM2K;

/** β, ν, α of the examples. */
type Fluid = [number, number, number];
const rayleighOf = (differenceK: number, lengthM: number, ...[beta, nu, alpha]: Fluid) =>
	rayleigh(differenceK, lengthM, {
		expansionPerK: beta,
		kinematicViscosityM2PerS: nu,
		diffusivityM2PerS: alpha
	});

/** Heat of a plate from its leading edge to a length, W per metre of width and kelvin. */
function plateConductance(speed: number, lengthM: number, nu: number, k: number, pr: number): number {
	if (lengthM === 0) return 0;
	const re = reynolds(speed, lengthM, nu);
	return k * (re <= CRITICAL_REYNOLDS ? nusseltPlateLaminar(re, pr) : nusseltPlateMixed(re, pr));
}

const FORCED: Record<string, Formula> = {
	reynolds,
	film,
	'critical length': criticalPlateLengthM,
	'plate laminar': nusseltPlateLaminar,
	'plate laminar, all Pr': nusseltPlateLaminarAllPrandtl,
	'plate turbulent': nusseltPlateTurbulent,
	'plate turbulent, Kreith': nusseltPlateTurbulentKreith,
	'film laminar': (speed: number, lengthM: number, nu: number, k: number, pr: number) =>
		film(nusseltPlateLaminar(reynolds(speed, lengthM, nu), pr), k, lengthM),
	'film mixed': (speed: number, lengthM: number, nu: number, k: number, pr: number) =>
		film(nusseltPlateMixed(reynolds(speed, lengthM, nu), pr), k, lengthM),
	strip: (speed: number, from: number, to: number, nu: number, k: number, pr: number, differenceK: number) =>
		differenceK * (plateConductance(speed, to, nu, k, pr) - plateConductance(speed, from, nu, k, pr)),
	'cylinder banded': nusseltCylinderBanded,
	'cylinder all speeds': nusseltCylinderAllSpeeds,
	'cylinder film': (speed: number, diameterM: number, nu: number, k: number, pr: number) =>
		film(nusseltCylinderAllSpeeds(reynolds(speed, diameterM, nu), pr), k, diameterM),
	sphere: nusseltSphere,
	'sphere cooling': (
		filmWPerM2K: number,
		diameterM: number,
		density: number,
		heat: number,
		fromC: number,
		toC: number,
		airC: number
	) => ((density * heat * diameterM) / (6 * filmWPerM2K)) * Math.log((fromC - airC) / (toC - airC))
};

function ductHeat(
	differenceK: number,
	heightM: number,
	widthM: number,
	...[beta, nu, alpha, k, pr]: [...Fluid, number, number]
) {
	const side = film(
		nusseltVerticalPlateLaminar(rayleighOf(differenceK, heightM, beta, nu, alpha), pr),
		k,
		heightM
	);
	const lengthM = horizontalPlateLengthM(widthM, 1e6, 'half-width');
	const ra = rayleighOf(differenceK, lengthM, beta, nu, alpha);
	const flat = (face: PlateFace) => film(nusseltHorizontalPlate(ra, face), k, lengthM);
	return (2 * side * heightM + (flat('hot-up') + flat('hot-down')) * widthM) * differenceK;
}

function pipeHeat(
	surfaceC: number,
	airC: number,
	diameterM: number,
	...[beta, nu, alpha, k, pr, emissivity]: [...Fluid, number, number, number]
) {
	const ra = rayleighOf(surfaceC - airC, diameterM, beta, nu, alpha);
	const perMetreM2 = Math.PI * diameterM;
	const convection = film(nusseltHorizontalCylinder(ra, pr), k, diameterM) * perMetreM2 * (surfaceC - airC);
	return convection + radiateBetween(emissivity * perMetreM2, surfaceC, airC);
}

const NATURAL: Record<string, Formula> = {
	rayleigh: rayleighOf,
	'film of Nu': film,
	'vertical plate': nusseltVerticalPlate,
	'film vertical laminar': (ra: number, pr: number, k: number, heightM: number) =>
		film(nusseltVerticalPlateLaminar(ra, pr), k, heightM),
	'screen heat': (
		differenceK: number,
		heightM: number,
		widthM: number,
		...[beta, nu, alpha, k, pr]: [...Fluid, number, number]
	) =>
		film(nusseltVerticalPlate(rayleighOf(differenceK, heightM, beta, nu, alpha), pr), k, heightM) *
		heightM *
		widthM *
		differenceK,
	'horizontal plate': nusseltHorizontalPlate,
	'film horizontal': (ra: number, face: PlateFace, k: number, lengthM: number) =>
		film(nusseltHorizontalPlate(ra, face), k, lengthM),
	'plate of any fluid': nusseltHorizontalPlateAllFluids,
	'duct heat': ductHeat,
	'horizontal cylinder': nusseltHorizontalCylinder,
	'cylinder in bands': nusseltHorizontalCylinderBanded,
	'pipe heat': pipeHeat,
	'natural sphere': nusseltNaturalSphere
};

describe('forced convection against published values', () => checkCases('forced-convection', FORCED));
describe('natural convection against published values', () => checkCases('natural-convection', NATURAL));
