import { acosDeg, asinDeg, atan2Deg, cosDeg, halfTurnDeg, sinDeg, tanDeg, turnDeg } from './angles';
import { requirePositive, requireWithin } from './require';
import { sunPlace, type CalendarDate, type UtcMoment } from './sun-ephemeris';

/** A place on the earth: north and east count up. */
export interface EarthPlace {
	latitudeDeg: number;
	longitudeDeg: number;
}

export interface SunPosition {
	/** Above the horizon, without the air's refraction, °. */
	elevationDeg: number;
	/** From north over east, °. */
	azimuthDeg: number;
	/** Towards the west from the meridian, −180…180°. */
	hourAngleDeg: number;
}

function requirePlace({ latitudeDeg, longitudeDeg }: EarthPlace): void {
	requireWithin(-90, 90, { latitudeDeg });
	requireWithin(-180, 180, { longitudeDeg });
}

/** How much the sun is lower seen from the ground than from the middle of the earth, at the horizon, °, at 1 AU. */
const PARALLAX_DEG = 8.794 / 3600;

/**
 * Where the sun stands in the sky.
 *
 *     H = θ + longitude − α
 *     sin h = sin φ sin δ + cos φ cos δ cos H,   tan A = sin H / (cos H sin φ − tan δ cos φ)      (A from south over west)
 *
 * @param moment year, month, day and hour, universal time
 * @param place latitude and longitude, °, north and east positive
 * @returns elevation without refraction, azimuth from north over east and hour angle, °
 * @throws EngineInputError for a latitude beyond ±90°, a longitude beyond ±180° or outside the years 1901 to 2099
 * Validity: 1901 to 2099, anywhere; within 0.01° of the full theory (0.006° at the moments tested).
 * Source: Meeus, Astronomical Algorithms, 2nd ed. 1998, eq. 13.5 and 13.6, with the place of ch. 25 (low accuracy) and the parallax of ch. 40.
 * @example
 * sunPosition({ year: 2003, month: 10, day: 17, hourUtc: 19.508333 }, { latitudeDeg: 39.742476, longitudeDeg: -105.1786 }).azimuthDeg; // 194.3
 */
export function sunPosition(moment: UtcMoment, place: EarthPlace): SunPosition {
	requirePlace(place);
	const { rightAscensionDeg, declinationDeg, siderealTimeDeg, distanceAu } = sunPlace(moment);
	const { latitudeDeg, longitudeDeg } = place;
	const hourAngleDeg = halfTurnDeg(siderealTimeDeg + longitudeDeg - rightAscensionDeg);
	const fromCentreDeg = asinDeg(
		sinDeg(latitudeDeg) * sinDeg(declinationDeg) +
			cosDeg(latitudeDeg) * cosDeg(declinationDeg) * cosDeg(hourAngleDeg)
	);
	const westOfSouthDeg = atan2Deg(
		sinDeg(hourAngleDeg),
		cosDeg(hourAngleDeg) * sinDeg(latitudeDeg) - tanDeg(declinationDeg) * cosDeg(latitudeDeg)
	);
	return {
		elevationDeg: fromCentreDeg - (PARALLAX_DEG / distanceAu) * cosDeg(fromCentreDeg),
		azimuthDeg: turnDeg(westOfSouthDeg + 180),
		hourAngleDeg
	};
}

/**
 * By how much the air lifts the sun.
 *
 *     Δh = (p/1010)(283/(273 + T)) 1.02 / (60 tan(h + 10.3/(h + 5.11)))      (p in hPa, h in °)
 *
 * @param elevationDeg h without refraction, °
 * @param pressurePa air pressure at the place, Pa
 * @param tempC air temperature at the place, °C
 * @returns Δh, °
 * @throws EngineInputError outside −0.8333…90°, −60…60 °C or for a pressure not above zero
 * Validity: from the moment the upper edge shows (−0.8333°) to the zenith; worse near the horizon, where the air's layers count.
 * Source: Reda and Andreas, Solar Position Algorithm for Solar Radiation Applications, NREL/TP-560-34302, 2008, eq. 42.
 * @example
 * refractionDeg(39.872046, 82000, 11); // 0.01633
 */
export function refractionDeg(elevationDeg: number, pressurePa: number, tempC: number): number {
	requireWithin(-0.8333, 90, { elevationDeg });
	requirePositive({ pressurePa });
	requireWithin(-60, 60, { tempC });
	const density = (pressurePa / 101_000) * (283 / (273 + tempC));
	return (density * 1.02) / (60 * tanDeg(elevationDeg + 10.3 / (elevationDeg + 5.11)));
}

/** The sun's day at a place; hours count from the beginning of the date in universal time and may lie outside 0…24. */
export interface SunTimes {
	/** When it stands in the meridian. */
	transitHourUtc: number;
	/** How high it then stands, without refraction, °. */
	noonElevationDeg: number;
	/** Null where it does not rise or does not set: the noon elevation says which. */
	sunriseHourUtc: number | null;
	sunsetHourUtc: number | null;
}

/** The centre of the sun when its upper edge appears: refraction 0.5667° and radius 0.2667°. */
const RISING_ELEVATION_DEG = -0.8333;
/** Each turn brings the moment nearer by a factor of several hundred; four reach well below a second. */
const TURNS = 4;

/** The moment near another at which the sun has a wanted hour angle, as if it moved 15° an hour. */
function approach(date: CalendarDate, place: EarthPlace, hourUtc: number, wantedDeg: number): number {
	const { hourAngleDeg } = sunPosition({ ...date, hourUtc }, place);
	return hourUtc + halfTurnDeg(wantedDeg - hourAngleDeg) / 15;
}

function findTransit(date: CalendarDate, place: EarthPlace): number {
	let hourUtc = 12 - place.longitudeDeg / 15;
	for (let turn = 0; turn < TURNS; turn++) hourUtc = approach(date, place, hourUtc, 0);
	return hourUtc;
}

/** Hour angle at which the sun rises or sets with the declination of a moment; null where it does neither. */
function horizonAngleDeg(date: CalendarDate, { latitudeDeg }: EarthPlace, hourUtc: number): number | null {
	const { declinationDeg } = sunPlace({ ...date, hourUtc });
	const cosine =
		(sinDeg(RISING_ELEVATION_DEG) - sinDeg(latitudeDeg) * sinDeg(declinationDeg)) /
		(cosDeg(latitudeDeg) * cosDeg(declinationDeg));
	return Math.abs(cosine) > 1 ? null : acosDeg(cosine);
}

/** Sunrise (side −1) or sunset (side 1). */
function findCrossing(
	date: CalendarDate,
	place: EarthPlace,
	transitHourUtc: number,
	side: 1 | -1
): number | null {
	let hourUtc = transitHourUtc;
	for (let turn = 0; turn < TURNS; turn++) {
		const angleDeg = horizonAngleDeg(date, place, hourUtc);
		if (angleDeg === null) return null;
		hourUtc = approach(date, place, hourUtc, side * angleDeg);
	}
	return hourUtc;
}

/**
 * Sunrise, highest stand and sunset on a date.
 *
 *     cos H0 = (sin(−0.8333°) − sin φ sin δ) / (cos φ cos δ),   each moment with the declination of that moment
 *
 * @param date year, month, day
 * @param place latitude and longitude, °, north and east positive
 * @returns hours of universal time from the beginning of the date, and the elevation at noon in °
 * @throws EngineInputError for a latitude beyond ±89.9°, a longitude beyond ±180° or outside the years 1901 to 2099
 * Validity: level horizon at sea level; within 2 s at the places tested (35° south, 40° north), worse towards
 *   the poles, where the sun grazes the horizon; the true refraction there varies by more.
 * Source: Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 15; −0.8333° as in Reda and Andreas, NREL/TP-560-34302, 2008, A.2.
 * @example
 * sunTimes({ year: 2015, month: 1, day: 2 }, { latitudeDeg: 39.742476, longitudeDeg: -105.1786 }).transitHourUtc; // 19.079
 */
export function sunTimes(date: CalendarDate, place: EarthPlace): SunTimes {
	requirePlace(place);
	requireWithin(-89.9, 89.9, { latitudeDeg: place.latitudeDeg });
	const transitHourUtc = findTransit(date, place);
	return {
		transitHourUtc,
		noonElevationDeg: sunPosition({ ...date, hourUtc: transitHourUtc }, place).elevationDeg,
		sunriseHourUtc: findCrossing(date, place, transitHourUtc, -1),
		sunsetHourUtc: findCrossing(date, place, transitHourUtc, 1)
	};
}
