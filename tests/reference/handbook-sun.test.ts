import { describe } from 'vitest';
import {
	extraterrestrialWPerM2,
	fittedClearSky,
	haurwitzWPerM2,
	julianDay,
	oldClearSkyBeamWPerM2,
	refractionDeg,
	relativeAirMass,
	solAirC,
	sunPlace,
	sunPosition,
	sunTimes,
	tauClearSky,
	type FittedClearSky,
	type SunPlace,
	type SunPosition,
	type SunTimes,
	type TauEdition
} from '../../src/lib/thermal/correlations';
import { checkCases, type Formula } from './support/report-cases';

const CLEAR_SKY: Record<string, Formula> = {
	extraterrestrial: extraterrestrialWPerM2,
	'old beam': oldClearSkyBeamWPerM2,
	fitted: (dayOfYear: number, elevationDeg: number, what: keyof FittedClearSky) =>
		fittedClearSky(dayOfYear, elevationDeg)[what],
	'air mass': relativeAirMass,
	tau: (
		extraterrestrial: number,
		elevationDeg: number,
		beamDepth: number,
		diffuseDepth: number,
		edition: TauEdition,
		what: 'beamWPerM2' | 'diffuseWPerM2'
	) =>
		tauClearSky({
			extraterrestrialWPerM2: extraterrestrial,
			elevationDeg,
			beamDepth,
			diffuseDepth,
			edition
		})[what],
	haurwitz: haurwitzWPerM2,
	'sol-air excess': (absorptivity: number, sunWPerM2: number, filmWPerM2K: number, skyLossWPerM2: number) =>
		solAirC({ airC: 0, absorptivity, irradianceWPerM2: sunWPerM2, filmWPerM2K, skyLossWPerM2 })
};

/** Year, month, day and hour of universal time; then latitude and longitude. */
type Moment = [number, number, number, number];
const momentOf = ([year, month, day, hourUtc]: Moment) => ({ year, month, day, hourUtc });

const SUN: Record<string, Formula> = {
	'julian day': (...moment: Moment) => julianDay(momentOf(moment)),
	place: (...[year, month, day, hour, what]: [...Moment, keyof SunPlace]) =>
		sunPlace(momentOf([year, month, day, hour]))[what],
	position: (
		...[year, month, day, hour, latitudeDeg, longitudeDeg, what]: [
			...Moment,
			number,
			number,
			keyof SunPosition
		]
	) => sunPosition(momentOf([year, month, day, hour]), { latitudeDeg, longitudeDeg })[what],
	refraction: refractionDeg,
	'apparent zenith': (
		...[year, month, day, hour, latitudeDeg, longitudeDeg, pressurePa, tempC]: [
			...Moment,
			number,
			number,
			number,
			number
		]
	) => {
		const place = { latitudeDeg, longitudeDeg };
		const { elevationDeg } = sunPosition(momentOf([year, month, day, hour]), place);
		return 90 - elevationDeg - refractionDeg(elevationDeg, pressurePa, tempC);
	},
	times: (
		year: number,
		month: number,
		day: number,
		latitudeDeg: number,
		longitudeDeg: number,
		what: keyof SunTimes
	) => sunTimes({ year, month, day }, { latitudeDeg, longitudeDeg })[what]!
};

describe('clear skies against published values', () => checkCases('clear-sky', CLEAR_SKY));
describe('the sun against published values', () => checkCases('sun', SUN));
