import { asinDeg, atan2Deg, cosDeg, halfTurnDeg, sinDeg, turnDeg } from './angles';
import { EngineInputError, requireWithin } from './require';

/** A day of the calendar. */
export interface CalendarDate {
	year: number;
	/** 1…12. */
	month: number;
	/** 1…31, whole; a moment within the day stands in the hour. */
	day: number;
}

/** A moment, universal time. The hour may lie outside 0…24 and then belongs to a neighbouring day. */
export interface UtcMoment extends CalendarDate {
	hourUtc: number;
}

/** The years for which the sun's place is good to 0.01°. */
const YEARS = { first: 1901, last: 2099 };

function requireDate({ year, month, day }: CalendarDate): void {
	requireWithin(YEARS.first, YEARS.last, { year });
	requireWithin(1, 12, { month });
	requireWithin(1, 31, { day });
	for (const [input, value] of Object.entries({ year, month, day })) {
		if (!Number.isInteger(value)) throw new EngineInputError(input, value, 'a whole number');
	}
}

/**
 * Julian day of a moment of the Gregorian calendar.
 *
 *     JD = ⌊365.25 (Y + 4716)⌋ + ⌊30.6001 (M + 1)⌋ + D + 2 − ⌊Y/100⌋ + ⌊Y/400⌋ − 1524.5      (January, February as months 13, 14 of Y − 1)
 *
 * @param moment year, month, day and hour, universal time
 * @returns Julian day, days
 * @throws EngineInputError outside the years 1901 to 2099, for a month or day that no calendar has, or an hour beyond ±72
 * Validity: 1901 to 2099.
 * Source: Meeus, Astronomical Algorithms, 2nd ed. 1998, eq. 7.1.
 * @example
 * julianDay({ year: 1957, month: 10, day: 4, hourUtc: 19.44 }); // 2436116.31
 */
export function julianDay({ year, month, day, hourUtc }: UtcMoment): number {
	requireDate({ year, month, day });
	requireWithin(-72, 72, { hourUtc });
	const late = month <= 2;
	const y = late ? year - 1 : year;
	const m = late ? month + 12 : month;
	const gregorian = 2 - Math.floor(y / 100) + Math.floor(y / 400);
	const days = Math.floor(365.25 * (y + 4716)) + Math.floor(30.6001 * (m + 1)) + day + gregorian;
	return days - 1524.5 + hourUtc / 24;
}

/** Where the sun stands seen from the middle of the earth, of the equinox of the date. */
export interface SunPlace {
	apparentLongitudeDeg: number;
	obliquityDeg: number;
	rightAscensionDeg: number;
	declinationDeg: number;
	/** Distance from the earth, astronomical units. */
	distanceAu: number;
	/** Sidereal time at Greenwich, apparent, °. */
	siderealTimeDeg: number;
	/** Sundial ahead of the clock, minutes. */
	equationOfTimeMin: number;
}

/** What the earth's rotation lags behind even time, about, from 2003 (64 s) to 2026 (69 s). */
const CLOCK_LAG_S = 67;

/** Mean motion of the sun, with the equation of the centre: longitude and distance, T centuries from 2000. */
function findOrbit(centuries: number): {
	trueLongitudeDeg: number;
	meanLongitudeDeg: number;
	distanceAu: number;
} {
	const t = centuries;
	const meanLongitudeDeg = 280.46646 + 36_000.76983 * t + 0.0003032 * t ** 2;
	const anomalyDeg = 357.52911 + 35_999.05029 * t - 0.0001537 * t ** 2;
	const eccentricity = 0.016708634 - 0.000042037 * t - 0.0000001267 * t ** 2;
	const centreDeg =
		(1.914602 - 0.004817 * t - 0.000014 * t ** 2) * sinDeg(anomalyDeg) +
		(0.019993 - 0.000101 * t) * sinDeg(2 * anomalyDeg) +
		0.000289 * sinDeg(3 * anomalyDeg);
	return {
		trueLongitudeDeg: meanLongitudeDeg + centreDeg,
		meanLongitudeDeg,
		distanceAu: (1.000001018 * (1 - eccentricity ** 2)) / (1 + eccentricity * cosDeg(anomalyDeg + centreDeg))
	};
}

/**
 * Place of the sun at a moment.
 *
 *     L0 = 280.46646 + 36000.76983 T + 0.0003032 T²,   M = 357.52911 + 35999.05029 T − 0.0001537 T²
 *     C = (1.914602 − 0.004817 T) sin M + (0.019993 − 0.000101 T) sin 2M + 0.000289 sin 3M
 *     λ = L0 + C − 0.00569 − 0.00478 sin Ω,   Ω = 125.04 − 1934.136 T,   ε = 23.439291 − 0.0130042 T + 0.00256 cos Ω
 *     tan α = cos ε tan λ,   sin δ = sin ε sin λ
 *
 * @param moment year, month, day and hour, universal time
 * @returns longitude, obliquity, right ascension, declination and sidereal time in °, distance in AU, equation of time in minutes
 * @throws EngineInputError outside the years 1901 to 2099 or for a date that no calendar has
 * Validity: 1901 to 2099; longitude within 0.01° (0.005° from the full theory of the moment tested), equation of time within 3 s.
 * Source: Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 12, 22, 25 (low accuracy) and 28.
 * @example
 * sunPlace({ year: 1992, month: 10, day: 13, hourUtc: 0 }).declinationDeg; // -7.785
 */
export function sunPlace(moment: UtcMoment): SunPlace {
	const days = julianDay(moment) - 2_451_545;
	const t = (days + CLOCK_LAG_S / 86_400) / 36_525;
	const { trueLongitudeDeg, meanLongitudeDeg, distanceAu } = findOrbit(t);
	const nodeDeg = 125.04 - 1934.136 * t;
	const nutationDeg = -0.00478 * sinDeg(nodeDeg);
	const apparentLongitudeDeg = turnDeg(trueLongitudeDeg - 0.00569 + nutationDeg);
	const meanObliquityDeg = 23.4392911 - 0.0130041667 * t - 1.639e-7 * t ** 2 + 5.036e-7 * t ** 3;
	const obliquityDeg = meanObliquityDeg + 0.00256 * cosDeg(nodeDeg);
	const rightAscensionDeg = turnDeg(
		atan2Deg(cosDeg(obliquityDeg) * sinDeg(apparentLongitudeDeg), cosDeg(apparentLongitudeDeg))
	);
	const equinoxesDeg = nutationDeg * cosDeg(obliquityDeg);
	return {
		apparentLongitudeDeg,
		obliquityDeg,
		rightAscensionDeg,
		declinationDeg: asinDeg(sinDeg(obliquityDeg) * sinDeg(apparentLongitudeDeg)),
		distanceAu,
		siderealTimeDeg: turnDeg(280.46061837 + 360.98564736629 * days + 0.000387933 * t ** 2 + equinoxesDeg),
		equationOfTimeMin: 4 * halfTurnDeg(meanLongitudeDeg - 0.0057183 - rightAscensionDeg + equinoxesDeg)
	};
}
