import { describe } from 'vitest';
import {
	balanceAiredShield,
	exchangeAreaConcentric,
	exchangeFactorParallel,
	floatingShieldTempsC,
	KELVIN_AT_ZERO_C,
	radiateBetween,
	radiativeConductance,
	solveGreyEnclosure,
	viewFactorBack,
	viewFactorCoaxialDiscs,
	viewFactorLongStrips,
	viewFactorParallelRectangles,
	viewFactorPerpendicularRectangles,
	type GreySurface,
	type ShieldBalance,
	type ShieldFaces
} from '../../src/lib/thermal/correlations';
import { checkCases, type Formula } from './support/report-cases';

const toC = (kelvin: number): number => kelvin - KELVIN_AT_ZERO_C;

/** Exchange area of two tubes and at most one shield between them, m² a metre; a shield is its diameter and emissivity. */
function tubeExchange(innerM: number, e1: number, outerM: number, e2: number, shield: number[]): number {
	const [shieldM, emissivity] = shield;
	const shields =
		shieldM === undefined || emissivity === undefined
			? []
			: [{ areaM2: Math.PI * shieldM, emissivityInside: emissivity, emissivityOutside: emissivity }];
	return exchangeAreaConcentric(
		{ areaM2: Math.PI * innerM, emissivity: e1 },
		{ areaM2: Math.PI * outerM, emissivity: e2 },
		shields
	);
}

/** Surfaces as area, emissivity and temperature in kelvin. */
function enclosure(surfaces: [number, number, number | null][], views: number[][]) {
	const grey: GreySurface[] = surfaces.map(([areaM2, emissivity, kelvin]) => ({
		areaM2,
		emissivity,
		tempC: kelvin === null ? null : toC(kelvin)
	}));
	return solveGreyEnclosure(grey, views);
}

/** Heat that a furnace open at one end loses through it: side, bottom and opening are black. */
function furnaceHeat(
	depthM: number,
	diameterM: number,
	sideK: number,
	bottomK: number,
	roomK: number,
	endToEnd: number
) {
	const endM2 = (Math.PI * diameterM ** 2) / 4;
	const sideM2 = Math.PI * diameterM * depthM;
	const sideToEnd = viewFactorBack(1 - endToEnd, endM2, sideM2);
	const views = [
		[1 - 2 * sideToEnd, sideToEnd, sideToEnd],
		[1 - endToEnd, 0, endToEnd],
		[1 - endToEnd, endToEnd, 0]
	];
	const { heatW } = enclosure(
		[
			[sideM2, 1, sideK],
			[endM2, 1, bottomK],
			[endM2, 1, roomK]
		],
		views
	);
	return -heatW[2]!;
}

const RADIATION: Record<string, Formula> = {
	flux: radiateBetween,
	planes: (hotK: number, coldK: number, e1: number, e2: number, shields: ShieldFaces[]) =>
		radiateBetween(exchangeFactorParallel(e1, e2, shields), toC(hotK), toC(coldK)),
	share: (e1: number, e2: number, shields: ShieldFaces[]) =>
		exchangeFactorParallel(e1, e2, shields) / exchangeFactorParallel(e1, e2),
	foil: (hotC: number, e1: number, coldC: number, e2: number, shields: ShieldFaces[], which: number) =>
		floatingShieldTempsC({ tempC: hotC, emissivity: e1 }, { tempC: coldC, emissivity: e2 }, shields)[which]!,
	'aired foil': (
		hotC: number,
		e1: number,
		coldC: number,
		e2: number,
		emissivity: number,
		filmWPerM2K: number,
		airC: number,
		what: keyof ShieldBalance
	) =>
		balanceAiredShield(
			{ tempC: hotC, emissivity: e1 },
			{ tempC: coldC, emissivity: e2 },
			{ faces: [emissivity, emissivity], filmsWPerM2K: [filmWPerM2K, filmWPerM2K], airC: [airC, airC] }
		)[what],
	linearised: radiativeConductance,
	tubes: (
		innerM: number,
		e1: number,
		innerK: number,
		outerM: number,
		e2: number,
		outerK: number,
		shield: number[]
	) => radiateBetween(tubeExchange(innerM, e1, outerM, e2, shield), toC(innerK), toC(outerK)),
	'tubes change': (innerM: number, e1: number, outerM: number, e2: number, shield: number[]) =>
		100 * (tubeExchange(innerM, e1, outerM, e2, shield) / tubeExchange(innerM, e1, outerM, e2, []) - 1),
	'enclosure heat': (surfaces: [number, number, number | null][], views: number[][], which: number) =>
		enclosure(surfaces, views).heatW[which]!,
	'enclosure temperature': (surfaces: [number, number, number | null][], views: number[][], which: number) =>
		enclosure(surfaces, views).tempC[which]! + KELVIN_AT_ZERO_C,
	furnace: furnaceHeat
};

const VIEW_FACTORS: Record<string, Formula> = {
	'parallel rectangles': viewFactorParallelRectangles,
	'perpendicular rectangles': viewFactorPerpendicularRectangles,
	discs: viewFactorCoaxialDiscs,
	back: viewFactorBack,
	strips: viewFactorLongStrips,
	// A tube as long as wide: one end sees the wall with what it does not see of the other end; the wall is four ends large.
	'tube wall to end': () => viewFactorBack(1 - viewFactorCoaxialDiscs(0.5, 0.5, 1), 1, 4)
};

describe('radiation against published values', () => checkCases('radiation', RADIATION));
describe('view factors against published values', () => checkCases('view-factors', VIEW_FACTORS));
