const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;

export interface SyntheticDay {
	/** From 1. */
	month: number;
	day: number;
	highestC: number;
	lowestC: number;
}

export interface SyntheticHour extends Pick<SyntheticDay, 'month' | 'day'> {
	/** 0 to 23. */
	hour: number;
	dryBulbC: number;
	sunWPerM2: number;
}

/** A made-up year: a season, a rise from day to day within each month, and a range that grows with the season. */
export function makeDays(hottestMonth = 1): SyntheticDay[] {
	return MONTH_DAYS.flatMap((days, index) => {
		const season = Math.cos(((index + 1 - hottestMonth) * Math.PI) / 6);
		return Array.from({ length: days }, (_, at) => {
			const highestC = 26 + 9 * season + 0.25 * (at % 9);
			return { month: index + 1, day: at + 1, highestC, lowestC: highestC - 12 - 2 * season };
		});
	});
}

/** Coolest at 05:00, hottest at 15:00, straight between; light from 06:00 to 18:00. */
export function makeHours(days: readonly SyntheticDay[]): SyntheticHour[] {
	return days.flatMap(({ month, day, highestC, lowestC }) =>
		Array.from({ length: 24 }, (_, hour) => {
			const sinceCoolest = (hour + 19) % 24;
			const share = sinceCoolest <= 10 ? sinceCoolest / 10 : (24 - sinceCoolest) / 14;
			const sunWPerM2 = Math.max(0, Math.round((900 + day) * Math.sin(((hour - 6) * Math.PI) / 12)));
			return { month, day, hour, dryBulbC: lowestC + share * (highestC - lowestC), sunWPerM2 };
		})
	);
}

const HEADER = [
	'LOCATION,Salt Lake,North,Nowhere,Invented,000000,-28.5,137.25,9.5,121',
	'DESIGN CONDITIONS,0',
	'TYPICAL/EXTREME PERIODS,0',
	'GROUND TEMPERATURES,0',
	'HOLIDAYS/DAYLIGHT SAVINGS,No,0,0,0',
	'COMMENTS 1,Made up, with a comma',
	'COMMENTS 2,',
	'DATA PERIODS,1,1,Data,Sunday, 1/ 1,12/31'
] as const;

/** Columns 8 to 13, and 15 to 35, of which nothing is read. */
const BEFORE_SUN = '5.0,30,99000,0,0,350';
const AFTER_SUN = '700,90,0,0,0,0,180,3.0,0,0,20.0,77777,9,999999999,10,0.1,0,88,0.2,0.0,0.0';

export const epwRow = ({ month, day, hour, dryBulbC, sunWPerM2 }: SyntheticHour): string =>
	`2003,${month},${day},${hour + 1},60,?9?9,${dryBulbC.toFixed(4)},${BEFORE_SUN},${sunWPerM2},${AFTER_SUN}`;

/** An EPW file with the first hour on line 9. */
export function makeEpwLines(hours: readonly SyntheticHour[] = makeHours(makeDays())): string[] {
	return [...HEADER, ...hours.map(epwRow)];
}

export const makeEpw = (hours?: readonly SyntheticHour[]): string =>
	`${makeEpwLines(hours).join('\r\n')}\r\n`;

const two = (value: number): string => String(value).padStart(2, '0');

/** A CSV file with the first hour on line 2. */
export function makeCsvLines(hours: readonly SyntheticHour[] = makeHours(makeDays())): string[] {
	return [
		'time,dry_bulb_c,global_horizontal_w_per_m2',
		...hours.map(
			({ month, day, hour, dryBulbC, sunWPerM2 }) =>
				`2003-${two(month)}-${two(day)}T${two(hour)}:00,${dryBulbC.toFixed(4)},${sunWPerM2}`
		)
	];
}

export const makeCsv = (hours?: readonly SyntheticHour[]): string => `${makeCsvLines(hours).join('\n')}\n`;
