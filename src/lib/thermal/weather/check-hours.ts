import { HOURS_A_DAY, LEAP_DAY, LEAP_YEAR_DAYS, sayHour } from './calendar';
import { FEWEST_HOURS, MOST_HOURS, type WeatherHour } from './weather-file';
import type { ProblemList } from './weather-problem';

const isInLeapDay = (hourOfYear: number): boolean => Math.floor(hourOfYear / HOURS_A_DAY) === LEAP_DAY;

/** A file has one row for each hour of a year, and few enough that it cannot be anything else. */
export function checkRowCount(rows: number, problems: ProblemList): void {
	if (rows < FEWEST_HOURS) {
		problems.addWhole(
			'too-few-hours',
			`${rows} hourly rows`,
			`a whole year, at least ${FEWEST_HOURS} hourly rows`
		);
	}
	if (rows > MOST_HOURS) {
		problems.addWhole('too-many-hours', `${rows} hourly rows`, `one year, at most ${MOST_HOURS} hourly rows`);
	}
}

function findRepeated(hours: readonly WeatherHour[], problems: ProblemList): Map<number, number> {
	const lineOf = new Map<number, number>();
	for (const { hourOfYear, line } of hours) {
		const first = lineOf.get(hourOfYear);
		if (first === undefined) lineOf.set(hourOfYear, line);
		else {
			const limit = `each hour once, and line ${first} has it already`;
			problems.add({ kind: 'repeated-hour', line, column: null, value: sayHour(hourOfYear), limit });
		}
	}
	return lineOf;
}

/** A gap is told once, at the line of the first hour that is there again. */
function tellGap(first: number, hours: number, line: number | null, problems: ProblemList): void {
	const value =
		hours === 1 ? `no row for ${sayHour(first)}` : `no rows for ${hours} hours from ${sayHour(first)}`;
	problems.add({ kind: 'missing-hours', line, column: null, value, limit: 'every hour of the year' });
}

function findMissing(lineOf: ReadonlyMap<number, number>, problems: ProblemList): void {
	const hasLeapDay = [...lineOf.keys()].some(isInLeapDay);
	let first = 0;
	let missing = 0;
	for (let hour = 0; hour < LEAP_YEAR_DAYS * HOURS_A_DAY; hour++) {
		if (!hasLeapDay && isInLeapDay(hour)) continue;
		const line = lineOf.get(hour);
		if (line === undefined) {
			if (missing === 0) first = hour;
			missing++;
		} else if (missing > 0) {
			tellGap(first, missing, line, problems);
			missing = 0;
		}
	}
	if (missing > 0) tellGap(first, missing, null, problems);
}

/** Every hour of a year is there, once; 29 February may be left out, but not a part of it. */
export function checkHours(hours: readonly WeatherHour[], problems: ProblemList): void {
	findMissing(findRepeated(hours, problems), problems);
}
