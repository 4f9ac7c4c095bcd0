import { sunWPerM2 } from './climate';

const FIRST_HOUR = 6;
const LAST_HOUR = 18;
const HOURS_A_DAY = 24;
export const CELLS_PER_H = 32;
const CELLS = (LAST_HOUR - FIRST_HOUR) * CELLS_PER_H;
const ONE_PEAK = { sunPeak: 1 };
/** For the slopes at the ends of the cells, h. */
const APART_H = 1e-4;

/** The sun over its peak as a cubic a cell of 1/32 h from six to six: four coefficients a cell, in the share of the cell. */
const CUBICS = (() => {
	const cubics = new Float64Array(4 * CELLS);
	const slopeAt = (hour: number) =>
		(sunWPerM2(hour + APART_H, ONE_PEAK) - sunWPerM2(hour - APART_H, ONE_PEAK)) / (2 * APART_H * CELLS_PER_H);
	// Where the sun comes up it grows as x^1.2, which is no cubic: the one that sums to the same, rise/2.2, stands in.
	const riseSlope = (rise: number, slope: number) => 12 * (rise / 2.2 - rise / 2) + slope;
	for (let cell = 0; cell < CELLS; cell++) {
		const start = FIRST_HOUR + cell / CELLS_PER_H;
		const end = FIRST_HOUR + (cell + 1) / CELLS_PER_H;
		const rise = sunWPerM2(end, ONE_PEAK) - sunWPerM2(start, ONE_PEAK);
		const startSlope = cell === 0 ? riseSlope(rise, slopeAt(end)) : slopeAt(start);
		const endSlope = cell === CELLS - 1 ? -riseSlope(-rise, -slopeAt(start)) : slopeAt(end);
		cubics[4 * cell] = sunWPerM2(start, ONE_PEAK);
		cubics[4 * cell + 1] = startSlope;
		cubics[4 * cell + 2] = 3 * rise - 2 * startSlope - endSlope;
		cubics[4 * cell + 3] = startSlope + endSlope - 2 * rise;
	}
	return cubics;
})();

/** The place of a clock hour among the cells, 0 where the sun comes up; the hour runs on past 24. */
export function findSunPlace(hour: number): number {
	return (hour - HOURS_A_DAY * Math.floor(hour / HOURS_A_DAY) - FIRST_HOUR) * CELLS_PER_H;
}

/** The sun over its peak at a place among the cells, to 3e-5; what `sunWPerM2` works out at length. */
export function readSunShape(place: number): number {
	const whole = Math.floor(place);
	if (whole < 0 || whole >= CELLS) return 0;
	const share = place - whole;
	const cell = 4 * whole;
	return (
		CUBICS[cell]! + share * (CUBICS[cell + 1]! + share * (CUBICS[cell + 2]! + share * CUBICS[cell + 3]!))
	);
}

/** Its slope, 1/h. */
export function readSunSlopePerH(place: number): number {
	const whole = Math.floor(place);
	if (whole < 0 || whole >= CELLS) return 0;
	const share = place - whole;
	const cell = 4 * whole;
	return CELLS_PER_H * (CUBICS[cell + 1]! + share * (2 * CUBICS[cell + 2]! + share * 3 * CUBICS[cell + 3]!));
}
