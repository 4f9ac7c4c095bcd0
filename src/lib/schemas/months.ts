import { z } from 'zod';
import { MONTH_NAMES } from '../thermal/weather';
import { joinWords } from '../format/join-words';

export const MONTH_KEYS = [
	...(['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun'] as const),
	...(['Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const)
] as const;
type MonthKey = (typeof MONTH_KEYS)[number];

/** The box of one month in a form: "daysOnRoadJan". */
export type MonthBox<Name extends string> = `${Name}${MonthKey}`;

/** The boxes of a row of months, January to December, with the names of the months. */
export function monthBoxes<Name extends string>(name: Name): { box: MonthBox<Name>; month: string }[] {
	return MONTH_KEYS.map((key, index) => ({ box: `${name}${key}` as const, month: MONTH_NAMES[index]! }));
}

/** One optional number for each month, as a form has them; `field` makes one from the name of its month. */
export function monthFields<Name extends string>(
	name: Name,
	field: (month: string) => z.ZodNumber
): Record<MonthBox<Name>, z.ZodNullable<z.ZodNumber>> {
	const entries = monthBoxes(name).map(({ box, month }) => [box, field(month).nullable()]);
	return Object.fromEntries(entries) as Record<MonthBox<Name>, z.ZodNullable<z.ZodNumber>>;
}

/** A year of months: twelve numbers, or none. */
export function monthList(field: z.ZodNumber, label: string) {
	return z
		.array(field)
		.length(MONTH_KEYS.length, { error: `${label} must have twelve entries, January to December.` })
		.nullable()
		.default(null)
		.meta({ label });
}

/** What stands in the boxes of a row. */
export function toMonthBoxes<Name extends string>(
	name: Name,
	values: readonly number[] | null
): Record<MonthBox<Name>, number | null> {
	const entries = monthBoxes(name).map(({ box }, index) => [box, values?.[index] ?? null]);
	return Object.fromEntries(entries) as Record<MonthBox<Name>, number | null>;
}

/** The row that the boxes make; null when a box is empty. */
export function fromMonthBoxes<Name extends string>(
	name: Name,
	boxes: Record<MonthBox<Name>, number | null>
): number[] | null {
	const values = monthBoxes(name).map(({ box }) => boxes[box]);
	return values.every((value) => value !== null) ? values : null;
}

const sayMonths = (months: readonly string[]): string =>
	`${joinWords(months)} ${months.length < 2 ? 'is' : 'are'}`;

/** Where a row is begun or needed, and boxes of it are empty: the first of them, and a sentence that names all. */
export function findEmptyBoxes<Name extends string>(
	name: Name,
	label: string,
	boxes: Record<MonthBox<Name>, number | null>,
	isNeeded: boolean
): { path: [MonthBox<Name>]; message: string } | null {
	const row = monthBoxes(name);
	const empty = row.filter(({ box }) => boxes[box] === null);
	const [first] = empty;
	if (!first || (empty.length === row.length && !isNeeded)) return null;
	const what = empty.length === row.length ? 'every month is' : sayMonths(empty.map(({ month }) => month));
	return { path: [first.box], message: `${label}: ${what} missing. Give all twelve months, or none.` };
}
