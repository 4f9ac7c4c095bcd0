import { describe, expect, it } from 'vitest';
import {
	EngineInputError,
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
	type TauSky
} from '../../src/lib/thermal/correlations';

const ALICE = { latitudeDeg: -23.7, longitudeDeg: 133.9 };
const TROMSO = { latitudeDeg: 69.65, longitudeDeg: 18.96 };
const DEPTHS: TauSky = {
	extraterrestrialWPerM2: 1410,
	elevationDeg: 60,
	beamDepth: 0.4,
	diffuseDepth: 2.2,
	edition: 2013
};

describe('the sun as it must behave', () => {
	it('turns once round between two highest stands: the hours of a day, to the equation of time', () => {
		const today = sunTimes({ year: 2026, month: 3, day: 10 }, ALICE).transitHourUtc;
		const tomorrow = sunTimes({ year: 2026, month: 3, day: 11 }, ALICE).transitHourUtc;
		expect(Math.abs(tomorrow - today) * 3600).toBeLessThan(30);
	});

	it('stands at −0.8333° when it rises and sets, and at its highest between', () => {
		const date = { year: 2026, month: 1, day: 15 };
		const { sunriseHourUtc, sunsetHourUtc, transitHourUtc, noonElevationDeg } = sunTimes(date, ALICE);
		for (const hourUtc of [sunriseHourUtc!, sunsetHourUtc!]) {
			// What is seen from the ground lies by the parallax, 0.0024°, below what the times go by.
			expect(sunPosition({ ...date, hourUtc }, ALICE).elevationDeg).toBeCloseTo(-0.8333 - 0.0025, 3);
		}
		for (const step of [-0.2, 0.2]) {
			const hourUtc = transitHourUtc + step;
			expect(sunPosition({ ...date, hourUtc }, ALICE).elevationDeg).toBeLessThan(noonElevationDeg);
		}
	});

	it('stands north at noon in the south and south in the north; rises in the east', () => {
		const date = { year: 2026, month: 7, day: 1 };
		const south = sunTimes(date, ALICE);
		const azimuth = (hourUtc: number) => sunPosition({ ...date, hourUtc }, ALICE).azimuthDeg;
		expect(Math.abs(((azimuth(south.transitHourUtc) + 180) % 360) - 180)).toBeLessThan(0.01);
		expect(azimuth(south.sunriseHourUtc!)).toBeGreaterThan(45);
		expect(azimuth(south.sunriseHourUtc!)).toBeLessThan(90);
		const rome = { latitudeDeg: 41.9, longitudeDeg: 12.5 };
		const noon = sunTimes(date, rome).transitHourUtc;
		expect(sunPosition({ ...date, hourUtc: noon }, rome).azimuthDeg).toBeCloseTo(180, 2);
	});

	it('neither sets in a polar summer nor rises in a polar winter, and the noon says which', () => {
		const summer = sunTimes({ year: 2026, month: 6, day: 21 }, TROMSO);
		expect([summer.sunriseHourUtc, summer.sunsetHourUtc]).toEqual([null, null]);
		expect(summer.noonElevationDeg).toBeGreaterThan(40);
		const winter = sunTimes({ year: 2026, month: 12, day: 21 }, TROMSO);
		expect([winter.sunriseHourUtc, winter.sunsetHourUtc]).toEqual([null, null]);
		expect(winter.noonElevationDeg).toBeLessThan(-0.8333);
	});

	it('keeps to the obliquity and to the year', () => {
		const declination = (month: number, day: number) =>
			sunPlace({ year: 2026, month, day, hourUtc: 12 }).declinationDeg;
		expect(declination(6, 21)).toBeCloseTo(23.436, 2);
		expect(declination(12, 21)).toBeCloseTo(-23.436, 2);
		expect(Math.abs(declination(3, 20))).toBeLessThan(0.2);
	});

	it('counts on over the hours of a day and over leap days', () => {
		const day = (moment: [number, number, number, number]) => {
			const [year, month, date, hourUtc] = moment;
			return julianDay({ year, month, day: date, hourUtc });
		};
		expect(day([2024, 3, 1, 0]) - day([2024, 2, 28, 0])).toBe(2);
		expect(day([2026, 3, 1, 0]) - day([2026, 2, 28, 0])).toBe(1);
		expect(day([2026, 5, 4, 30])).toBeCloseTo(day([2026, 5, 5, 6]), 8);
	});
});

describe('clear skies as they must behave', () => {
	it('grow brighter as the sun climbs, and never beyond what arrives outside', () => {
		const laws: ((elevationDeg: number) => number)[] = [
			(elevationDeg) => oldClearSkyBeamWPerM2(6, elevationDeg),
			(elevationDeg) => fittedClearSky(172, elevationDeg).beamWPerM2,
			(elevationDeg) => tauClearSky({ ...DEPTHS, elevationDeg }).beamWPerM2,
			haurwitzWPerM2
		];
		for (const law of laws) {
			const values = [2, 10, 30, 60, 90].map(law);
			expect(values.every((value, at) => at === 0 || value > values[at - 1]!)).toBe(true);
			expect(values.at(-1)).toBeLessThan(1361);
		}
	});

	it('has no light at the horizon by Haurwitz, and one air mass overhead', () => {
		expect(haurwitzWPerM2(0)).toBe(0);
		expect(relativeAirMass(90)).toBeCloseTo(1, 3);
	});

	it('of the two older forms agree within 4 % on the 21st of each month, as near as a sine comes', () => {
		const twentyFirsts = [21, 52, 80, 111, 141, 172, 202, 233, 264, 294, 325, 355];
		twentyFirsts.forEach((dayOfYear, at) => {
			const ratio = fittedClearSky(dayOfYear, 50).beamWPerM2 / oldClearSkyBeamWPerM2(at + 1, 50);
			expect(Math.abs(ratio - 1)).toBeLessThan(0.04);
		});
	});

	it('warm a surface to the air’s temperature without sun and sky loss', () => {
		const still = { airC: 25, absorptivity: 0.9, irradianceWPerM2: 0, filmWPerM2K: 17, skyLossWPerM2: 0 };
		expect(solAirC(still)).toBe(25);
	});
});

describe('sun and sky outside their range', () => {
	const date = { year: 2026, month: 1, day: 1 };
	it.each([
		['a year of another century', () => sunPlace({ ...date, year: 1850, hourUtc: 0 }), 'year', 1850],
		['a thirteenth month', () => julianDay({ ...date, month: 13, hourUtc: 0 }), 'month', 13],
		['half a day in the date', () => julianDay({ ...date, day: 1.5, hourUtc: 0 }), 'day', 1.5],
		['an hour of another week', () => julianDay({ ...date, hourUtc: 100 }), 'hourUtc', 100],
		['a latitude beyond the pole', () => sunTimes(date, { ...ALICE, latitudeDeg: 91 }), 'latitudeDeg', 91],
		['sunrise at the pole', () => sunTimes(date, { ...ALICE, latitudeDeg: -90 }), 'latitudeDeg', -90],
		[
			'a longitude beyond the date line',
			() => sunPosition({ ...date, hourUtc: 0 }, { ...ALICE, longitudeDeg: 200 }),
			'longitudeDeg',
			200
		],
		['refraction of a sun that is down', () => refractionDeg(-2, 101_325, 20), 'elevationDeg', -2],
		['air under the horizon', () => relativeAirMass(-1), 'elevationDeg', -1],
		['a day after the last', () => extraterrestrialWPerM2(367), 'dayOfYear', 367],
		['an old clear sky at the horizon', () => oldClearSkyBeamWPerM2(1, 0), 'elevationDeg', 0],
		['half a month', () => oldClearSkyBeamWPerM2(1.5, 30), 'month', 1.5],
		['a fitted sky on day 0', () => fittedClearSky(0, 30), 'dayOfYear', 0],
		['an optical depth of fog', () => tauClearSky({ ...DEPTHS, beamDepth: 3 }), 'beamDepth', 3],
		['Haurwitz at night', () => haurwitzWPerM2(-5), 'elevationDeg', -5],
		[
			'a surface that takes in more than arrives',
			() => solAirC({ airC: 20, absorptivity: 1.2, irradianceWPerM2: 1, filmWPerM2K: 1, skyLossWPerM2: 0 }),
			'absorptivity',
			1.2
		]
	] as const)('are refused with name and value: %s', (_, run, input, value) => {
		expect(run).toThrow(EngineInputError);
		expect(run).toThrow(expect.objectContaining({ input, value }) as Error);
	});
});
