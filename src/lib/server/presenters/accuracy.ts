import { formatClimateZone } from '$lib/format/climate-zones';
import {
	FEWEST_READINGS,
	GROUPINGS,
	TEMPERATURE_KINDS,
	type Accuracy,
	type ChanceBin,
	type DaysFigures,
	type ErrorFigures,
	type Grouping,
	type LeftOut,
	type ReadingKind
} from '$lib/schemas/accuracy';
import { NO_ZONE } from '$lib/schemas/review';
import { clopperPearsonInterval, poissonRatioInterval } from '$lib/thermal/statistics';
import { POSITION_LABELS, type PositionKind } from '$lib/thermal/survey';

const CONFIDENCE = 0.95;
const DAYS_A_YEAR = 365.25;
/** Below this no ratio is formed: a thousandth of a day stated is nothing to hold a report against. */
const LEAST_STATED_DAYS = 1e-3;

/** Sums over the readings of one kind, book, zone and kind of position. */
export interface CheckSums {
	kind: ReadingKind;
	book: number;
	/** Empty where no place is known. */
	zone: string;
	position: PositionKind;
	/** Of cut-outs: whether somebody has looked at the battery. */
	isLookedAt: boolean;
	/** Measured to a number; of cut-outs, installations. */
	readings: number;
	error: number;
	square: number;
	inside: number;
	oneSided: number;
	oneSidedOutside: number;
	enteredLater: number;
	stated: number;
	reported: number;
	observedDays: number;
}

type Sum = Exclude<keyof CheckSums, 'kind' | 'book' | 'zone' | 'position' | 'isLookedAt'>;

const total = (rows: readonly CheckSums[], of: Sum): number => rows.reduce((sum, row) => sum + row[of], 0);

/** A share with its exact interval; null where there are too few to tell. */
function shareOf(events: number, trials: number): ErrorFigures['insideShare'] {
	if (trials < FEWEST_READINGS) return null;
	return { value: events / trials, ...clopperPearsonInterval(events, trials, CONFIDENCE) };
}

export function errorFigures(rows: readonly CheckSums[]): ErrorFigures {
	const readings = total(rows, 'readings');
	const inside = total(rows, 'inside');
	const isEnough = readings >= FEWEST_READINGS;
	return {
		readings,
		bias: isEnough ? total(rows, 'error') / readings : null,
		rootMeanSquare: isEnough ? Math.sqrt(total(rows, 'square') / readings) : null,
		inside,
		insideShare: shareOf(inside, readings),
		oneSided: total(rows, 'oneSided'),
		oneSidedOutside: total(rows, 'oneSidedOutside'),
		enteredLater: total(rows, 'enteredLater')
	};
}

export function daysFigures(rows: readonly CheckSums[]): DaysFigures {
	const installations = total(rows, 'readings');
	const observedYears = total(rows, 'observedDays') / DAYS_A_YEAR;
	const [statedDays, reportedDays] = [total(rows, 'stated'), total(rows, 'reported')];
	const isEnough = installations >= FEWEST_READINGS && observedYears > 0;
	return {
		installations,
		lookedAt: total(
			rows.filter(({ isLookedAt }) => isLookedAt),
			'readings'
		),
		...{ observedYears, statedDays, reportedDays },
		statedDaysAYear: isEnough ? statedDays / observedYears : null,
		reportedDaysAYear: isEnough ? reportedDays / observedYears : null,
		ratio:
			isEnough && statedDays >= LEAST_STATED_DAYS
				? {
						value: reportedDays / statedDays,
						...poissonRatioInterval(reportedDays, statedDays, CONFIDENCE)
					}
				: null
	};
}

/** The edges of the bins of a stated chance: closer at the ends, where most of them are. */
export const CHANCE_EDGES = [0, 0.05, 0.15, 0.35, 0.65, 0.85, 1] as const;

/** What was counted in a bin, by its number from 0 on. */
export interface ChanceSums {
	bin: number;
	installations: number;
	chances: number;
	wentDark: number;
}

export function chanceBins(rows: readonly ChanceSums[]): ChanceBin[] {
	return CHANCE_EDGES.slice(1).map((to, bin) => {
		const sums = rows.find((row) => row.bin === bin);
		const installations = sums?.installations ?? 0;
		const wentDark = sums?.wentDark ?? 0;
		return {
			...{ from: CHANCE_EDGES[bin]!, to, installations, wentDark },
			statedShare: sums && installations > 0 ? sums.chances / installations : null,
			observedShare: shareOf(wentDark, installations)
		};
	});
}

/** Errors are counted in steps of so many kelvin, so many on each side; the last hold what lies beyond. */
export const STEP_K = 2;
export const STEPS_EACH_SIDE = 10;

export interface StepSums {
	kind: ReadingKind;
	/** From −STEPS_EACH_SIDE on. */
	step: number;
	readings: number;
}

function errorSteps(kind: ReadingKind, rows: readonly StepSums[]) {
	return Array.from({ length: 2 * STEPS_EACH_SIDE }, (_, at) => {
		const step = at - STEPS_EACH_SIDE;
		const found = rows.find((row) => row.kind === kind && row.step === step);
		return { fromK: step * STEP_K, toK: (step + 1) * STEP_K, readings: found?.readings ?? 0 };
	});
}

interface Group<Figures> {
	key: string;
	name: string;
	figures: Figures;
}

type NameOf = Record<Grouping, (key: string) => string>;

const KEY_OF: Record<Grouping, (row: CheckSums) => string> = {
	book: ({ book }) => String(book),
	zone: ({ zone }) => zone || NO_ZONE,
	position: ({ position }) => position
};

/** Climate classes and positions by name, books by number, the newest first; what has no place last. */
const COMPARE: Record<Grouping, (a: string, b: string) => number> = {
	book: (a, b) => Number(b) - Number(a),
	zone: (a, b) => Number(a === NO_ZONE) - Number(b === NO_ZONE) || a.localeCompare(b),
	position: (a, b) => Object.keys(POSITION_LABELS).indexOf(a) - Object.keys(POSITION_LABELS).indexOf(b)
};

export const namesOf = (books: ReadonlyMap<number, string>): NameOf => ({
	book: (key) => `${key}. ${books.get(Number(key)) ?? ''}`,
	zone: (key) => (key === NO_ZONE ? 'No place was given' : formatClimateZone(key)),
	position: (key) => POSITION_LABELS[key as PositionKind]
});

function groupAll<Figures>(
	rows: readonly CheckSums[],
	nameOf: NameOf,
	figuresOf: (rows: readonly CheckSums[]) => Figures
): Record<Grouping, Group<Figures>[]> {
	const groupBy = (grouping: Grouping): Group<Figures>[] => {
		const keyOf = KEY_OF[grouping];
		return [...new Set(rows.map(keyOf))].sort(COMPARE[grouping]).map((key) => ({
			...{ key, name: nameOf[grouping](key) },
			figures: figuresOf(rows.filter((row) => keyOf(row) === key))
		}));
	};
	return Object.fromEntries(GROUPINGS.map((grouping) => [grouping, groupBy(grouping)])) as Record<
		Grouping,
		Group<Figures>[]
	>;
}

/** Everything that was counted of a workshop. */
export interface CountedChecks {
	sums: readonly CheckSums[];
	steps: readonly StepSums[];
	chances: readonly ChanceSums[];
	leftOut: readonly { kind: ReadingKind; why: LeftOut; readings: number; inside: number }[];
	/** Capacity tests that no outlook has been held against. */
	waiting: number;
	/** Traces that are being held against what had been predicted of them. */
	waitingTraces: number;
	unheldTraces: number;
	books: ReadonlyMap<number, string>;
}

/** How the predictions did, kind by kind; a kind of which nothing was read is not there. */
export function presentAccuracy(counted: CountedChecks): Accuracy {
	const nameOf = namesOf(counted.books);
	const ofKind = (kind: ReadingKind): CheckSums[] => counted.sums.filter((row) => row.kind === kind);
	const days = ofKind('cut-out');
	const tests = ofKind('capacity');
	return {
		fewest: FEWEST_READINGS,
		temperatures: TEMPERATURE_KINDS.filter((kind) => ofKind(kind).length > 0).map((kind) => ({
			kind,
			all: errorFigures(ofKind(kind)),
			by: groupAll(ofKind(kind), nameOf, errorFigures),
			steps: errorSteps(kind, counted.steps)
		})),
		cutOuts:
			days.length === 0
				? null
				: {
						all: daysFigures(days),
						lookedAt: daysFigures(days.filter(({ isLookedAt }) => isLookedAt)),
						by: groupAll(days, nameOf, daysFigures),
						chances: chanceBins(counted.chances)
					},
		capacity:
			tests.length === 0 && counted.waiting === 0
				? null
				: {
						all: errorFigures(tests),
						by: groupAll(tests, nameOf, errorFigures),
						waiting: counted.waiting
					},
		leftOut: [...counted.leftOut],
		waitingTraces: counted.waitingTraces,
		unheldTraces: counted.unheldTraces
	};
}
