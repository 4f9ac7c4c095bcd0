import { isClock, numberOf, readTimeOf } from './cell-kinds';
import { DATE_ORDERS, type DateOrder, type TimeMapping } from './mapping';

/** A column as it stands in the beginning of a file. */
export interface SampleColumn {
	/** Counted from 1. */
	number: number;
	name: string;
	cells: string[];
}

export interface TimeProposal {
	mapping: TimeMapping;
	/** One sentence on how the time was found. */
	why: string;
	/** Two readings fit equally well: somebody has to say which. */
	ambiguous: boolean;
	/** The file says nothing of its zone: the one in the mapping is the caller's. */
	needsZone: boolean;
}

/** So large a share of the cells must read as what the column is held for. */
const SHARE = 0.9;
/** Of two orders that fit equally well the first is proposed. */
const ORDER_OF_CHOICE: readonly DateOrder[] = ['dmy', 'mdy', 'ymd'];
const ORDER_WORDS: Readonly<Record<DateOrder, string>> = {
	ymd: 'year, month, day',
	dmy: 'day, month, year',
	mdy: 'month, day, year'
};
const COUNTER_NAME = /^(#|no\.?|nr\.?|id|index|record|row|sample|scan|count|reading)$/i;
const TIME_NAME = /time|elapsed|seconds?|minutes?|\bs\b|\bsec\b|\bmin\b/i;
const MINUTE_NAME = /\bmin(ute)?s?\b/i;
/** From 2000 to 2100. */
const EPOCHS = [
	{ kind: 'epoch-s', from: 946_684_800, to: 4_102_444_800, unit: 'seconds' },
	{ kind: 'epoch-ms', from: 946_684_800_000, to: 4_102_444_800_000, unit: 'milliseconds' }
] as const;

const told = ({ cells }: SampleColumn): string[] => cells.filter((cell) => cell !== '');

function mostAre(column: SampleColumn, holds: (cell: string) => boolean): boolean {
	const cells = told(column);
	return cells.length > 0 && cells.filter(holds).length >= SHARE * cells.length;
}

/** Whether numbers, once more with this decimal sign, hardly ever fall back. */
function mostlyRises(numbers: readonly number[]): boolean {
	const rises = numbers.slice(1).filter((value, at) => value > numbers[at]!).length;
	return numbers.length > 1 && rises >= SHARE * (numbers.length - 1);
}

/** How far the days of a column jump about when read in this order: the right order has them follow each other. */
function totalJump(column: SampleColumn, order: DateOrder): number {
	const days = told(column).flatMap((cell) => readTimeOf(cell, order)?.days ?? []);
	return days.slice(1).reduce((sum, day, at) => sum + Math.abs(day - days[at]!), 0);
}

interface ChosenOrder {
	order: DateOrder;
	why: string;
	ambiguous: boolean;
}

function chooseOrder(column: SampleColumn, kind: 'date' | 'date-time'): ChosenOrder | null {
	const fitting = ORDER_OF_CHOICE.filter((order) =>
		mostAre(column, (cell) => readTimeOf(cell, order)?.kind === kind)
	);
	const jumps = fitting.map((order) => totalJump(column, order));
	const least = Math.min(...jumps);
	const best = fitting.filter((_, at) => jumps[at] === least);
	const [order] = best;
	if (order === undefined) return null;
	const read = `Dates in column ${column.number} read as ${ORDER_WORDS[order]}`;
	if (best.length > 1) {
		const others = best.slice(1).map((other) => ORDER_WORDS[other]);
		return { order, why: `${read}; ${others.join(' or ')} fits as well.`, ambiguous: true };
	}
	const reason = fitting.length > 1 ? 'only so do the days follow each other' : 'no other order fits';
	return { order, why: `${read}: ${reason}.`, ambiguous: false };
}

type Finder = (columns: readonly SampleColumn[], timeZone: string, decimal: string) => TimeProposal | null;

/** The first that a function makes something of. */
function firstOf<Item, Found>(items: readonly Item[], find: (item: Item) => Found | null): Found | null {
	for (const item of items) {
		const found = find(item);
		if (found !== null) return found;
	}
	return null;
}

const findDateTime: Finder = (columns, timeZone) =>
	firstOf(columns, (column) => {
		const chosen = chooseOrder(column, 'date-time');
		if (!chosen) return null;
		const { order, why, ambiguous } = chosen;
		const needsZone = !mostAre(column, (cell) => readTimeOf(cell, order)?.hasOffset === true);
		const mapping = { kind: 'calendar', column: column.number, clockColumn: null, order, timeZone } as const;
		return { mapping, why, ambiguous, needsZone };
	});

const findDateAndClock: Finder = (columns, timeZone) => {
	const clock = columns.find((column) => mostAre(column, isClock));
	if (!clock) return null;
	return firstOf(columns, (column) => {
		const chosen = chooseOrder(column, 'date');
		if (!chosen) return null;
		const { order, why, ambiguous } = chosen;
		const places = { column: column.number, clockColumn: clock.number };
		return { mapping: { kind: 'calendar', ...places, order, timeZone }, why, ambiguous, needsZone: true };
	});
};

const findEpoch: Finder = (columns, timeZone, decimal) =>
	firstOf(columns, (column) => {
		const numbers = told(column).map((cell) => numberOf(cell, decimal));
		const epoch = EPOCHS.find(({ from, to }) => numbers.every((value) => value >= from && value <= to));
		if (!epoch || numbers.length === 0) return null;
		const why = `Column ${column.number} counts ${epoch.unit} since 1970 UTC.`;
		const mapping = { kind: epoch.kind, column: column.number, timeZone };
		return { mapping, why, ambiguous: false, needsZone: true };
	});

const findClock: Finder = (columns, timeZone) => {
	const clock = columns.find((column) => mostAre(column, isClock));
	if (!clock) return null;
	const why = `Column ${clock.number} is a time of day; the file says no date.`;
	const mapping = { kind: 'time-of-day', column: clock.number, firstDay: null, timeZone } as const;
	return { mapping, why, ambiguous: false, needsZone: true };
};

const findElapsed: Finder = (columns, _timeZone, decimal) => {
	const rising = columns.filter(
		(column) =>
			!COUNTER_NAME.test(column.name) && mostlyRises(told(column).map((cell) => numberOf(cell, decimal)))
	);
	const column = rising.find(({ name }) => TIME_NAME.test(name)) ?? rising.find(({ number }) => number === 1);
	if (!column) return null;
	const named = TIME_NAME.test(column.name);
	const isMinutes = MINUTE_NAME.test(column.name);
	const unit = isMinutes ? 'minutes' : 'seconds';
	const why = `Column ${column.number} rises from row to row: ${unit} since the start${named ? '' : ', by assumption'}.`;
	const mapping = { kind: isMinutes ? 'elapsed-min' : 'elapsed-s', column: column.number } as const;
	return { mapping, why, ambiguous: !named, needsZone: false };
};

/** What is looked for, the surest first. */
const FINDERS: readonly Finder[] = [findDateTime, findDateAndClock, findEpoch, findClock, findElapsed];

/** Where and how the rows of a file say their time; null where no column does. */
export function findTime(
	columns: readonly SampleColumn[],
	timeZone: string,
	decimal: string
): TimeProposal | null {
	return firstOf(FINDERS, (find) => find(columns, timeZone, decimal));
}

/** All orders that a date can have, in words: for those who are asked which it is. */
export const DATE_ORDER_WORDS = DATE_ORDERS.map((order) => ({ order, words: ORDER_WORDS[order] }));
