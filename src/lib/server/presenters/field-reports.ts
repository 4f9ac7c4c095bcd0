import { formatDate } from '$lib/format/dates';
import { joinWords } from '$lib/format/join-words';
import {
	formatCapacity,
	formatAmps,
	formatKelvin,
	formatNumber,
	formatPercent,
	formatTemperature,
	formatWithUnit
} from '$lib/format/numbers';
import { sayDoubt, sayTeachesNothing, sayUnjudged, UNJUDGED } from '$lib/format/field-doubt-words';
import { compareDays, sayDayCount, sayOfTwenty } from '$lib/format/outlook-words';
import { formatClockHour, formatHours } from '$lib/format/time';
import {
	FIELD_NOTE_LABELS,
	type FieldFinding,
	type FieldNoteData,
	type FieldNotesView,
	type FieldNoteView
} from '$lib/schemas/field-notes';
import type { NoteReport, TrendReport } from '$lib/schemas/field-reports';
import type { HeatCause, HourRange, Learning, TrendLaw, YearsRange } from '$lib/thermal/field';

const PLACES = { case: 'on the case', cells: 'on the cells', board: 'on the BMS board' } as const;

function sayData(data: FieldNoteData): string {
	switch (data.kind) {
		case 'inspection':
			return data.words;
		case 'capacity-test':
			return `${formatCapacity(data.capacityAh)} at ${formatAmps(data.currentA)} down to ${formatWithUnit(data.cutOffV, 'V', 1)}, battery at ${formatTemperature(data.tempC)}.`;
		case 'peak-label': {
			const turned =
				data.turnedC === null ? 'No field has turned' : `${formatTemperature(data.turnedC)} has turned`;
			const not = data.notTurnedC === null ? 'all have' : `${formatTemperature(data.notTurnedC)} has not`;
			return `Label ${PLACES[data.place]}: ${turned}, ${not}. Hottest day since: ${formatTemperature(data.hottestDayC)}.`;
		}
		case 'cut-out': {
			const back =
				data.cameBackHour === null
					? 'nobody knows when it came back'
					: `back by itself at ${formatClockHour(data.cameBackHour)}`;
			return `Went dark at ${formatClockHour(data.wentDarkHour)}, ${back}, known to within ${formatHours(data.withinHours)}. The day got to ${formatTemperature(data.hottestDayC)}.`;
		}
	}
}

const WORDS = { explained: 'Yes', possible: 'Perhaps', 'not-explained': 'Hardly' } as const;

const sayRange = ({ lowHour, middleHour, highHour }: HourRange): string =>
	`${formatClockHour(middleHour)} (${formatClockHour(lowHour)} to ${formatClockHour(highHour)})`;

function sayUsual({ usuallyDark, usuallyBack, darkShare }: HeatCause): string {
	if (!usuallyDark) return `On such a day it goes dark from heat on ${sayOfTwenty(darkShare)} days.`;
	const back = usuallyBack ? `, and comes back at ${sayRange(usuallyBack)}` : '';
	return `Where heat does it on such a day, it goes dark at ${sayRange(usuallyDark)}${back}.`;
}

function sayCause(cause: HeatCause): string {
	const { finding, heatProbability, drivenHours, airFalling } = cause;
	const air = airFalling ? ', with the air outside already getting cooler' : '';
	const when = `It went dark after ${formatHours(drivenHours)} of driving${air}.`;
	const chances = Math.round(20 * heatProbability);
	const chance = chances === 0 ? 'with fewer than 1 chance in 20' : `with about ${chances} chances in 20`;
	if (finding === 'explained')
		return `Heat alone explains both when it went dark and when it came back, ${chance}. ${when}`;
	if (finding === 'possible') return `Heat alone may explain it, ${chance}. ${when}`;
	return `Heat alone hardly explains it, ${chance}. ${when}`;
}

function presentCause(cause: HeatCause | null, note: FieldNoteView): NoteReport['cause'] {
	if (!cause) return null;
	const word = WORDS[cause.finding];
	if (note.judgedBy.otherwise.length > 0)
		return {
			...{ word: UNJUDGED, sentence: sayUnjudged(note.judgedBy, word) },
			...{ usual: '', doubt: '', others: [] }
		};
	return {
		word,
		sentence: sayCause(cause),
		usual: sayUsual(cause),
		doubt: note.doubts > 0 ? sayDoubt(note.doubts) : '',
		others:
			cause.finding === 'explained' ? [] : cause.otherCauses.map(({ label, measure }) => ({ label, measure }))
	};
}

function sayLearnt({ fits, unknowns, before, after }: Learning, cause: HeatCause | null): string {
	if (!fits && cause?.finding === 'explained') {
		return 'By itself heat explains it, but not together with what was noted of this mount before: one of the two is off, or the mount is not as it was. Look at the earlier readings, the label and the shielding before you go by either. Nothing was changed.';
	}
	if (!fits) {
		return 'This lies outside of what the estimate held possible: look at the reading again, and at the survey. Nothing was changed.';
	}
	const told = unknowns.slice(0, 3).map(({ label }) => label);
	const about = told.length > 0 ? ` It tells most of ${joinWords(told)}.` : '';
	return `With this ${sayChange(before, after)}.${about}`;
}

type Belief = Learning['before'];

const DAYS_CHANGED = {
	fewer: 'fewer dark days than',
	more: 'more dark days than',
	alike: 'about as many dark days as'
} as const;

function sayChange(before: Belief, after: Belief): string {
	const days = DAYS_CHANGED[compareDays(before.year.year, after.year.year)];
	const gainedK = after.headroomMiddleK - before.headroomMiddleK;
	const headroom = Math.abs(gainedK) < 1 ? '' : `, with ${gainedK < 0 ? 'less' : 'more'} headroom`;
	return `${days} before are to be expected${headroom}`;
}

function presentLearning(learning: Learning | null, cause: HeatCause | null): NoteReport['learning'] {
	if (!learning) return null;
	const { before, after, fits, samples, seed, effectiveSamples } = learning;
	const range = ({ headroomLowK, headroomMiddleK, headroomHighK }: typeof before): string =>
		`${formatKelvin(headroomMiddleK)} (${formatKelvin(headroomLowK)} to ${formatKelvin(headroomHighK)})`;
	const row = (label: string, read: (belief: typeof before) => string) => ({
		...{ label, before: read(before), after: read(after) }
	});
	return {
		sentence: sayLearnt(learning, cause),
		rows: fits
			? [
					row('Dark days a year', ({ year }) => sayDayCount(year.year)),
					row('Dark on the planned day', ({ cutOutShare }) => sayOfTwenty(cutOutShare)),
					row('Headroom on it', range)
				]
			: [],
		method: `${samples} vehicles and mounts drawn with the seed ${seed}; what agrees with the notes so far says as much as ${formatNumber(effectiveSamples)} of them.`
	};
}

/** What was learnt with a note that was struck out since does not count, and says what to do about it. */
function presentResting({ notedOn, isNotedAnew }: Resting): NonNullable<NoteReport['learning']> {
	const next = isNotedAnew
		? 'This reading was noted once more, and weighed without that one.'
		: 'Note this reading once more, with the same day and the same figures: it is then weighed without that one.';
	return {
		sentence: `What it taught rested on the note of ${formatDate(notedOn)}, which was struck out since, and does not count. ${next}`,
		rows: [],
		method: ''
	};
}
type Resting = NonNullable<FieldNoteView['restsOnStruck']>;

function presentFinding(note: FieldNoteView): Pick<NoteReport, 'cause' | 'learning' | 'anew'> {
	const { finding, findingThen, struck } = note;
	if (!finding || struck) return { cause: null, learning: null, anew: '' };
	return {
		cause: presentCause(finding.cause, note),
		learning: presentLearnt(finding, note),
		anew: findingThen ? sayAnew(findingThen) : ''
	};
}

function presentLearnt({ cause, learning }: FieldFinding, note: FieldNoteView): NoteReport['learning'] {
	if (note.restsOnStruck) return presentResting(note.restsOnStruck);
	const { otherwise } = note.judgedBy;
	if (learning && otherwise.length > 0)
		return { sentence: sayTeachesNothing(otherwise), rows: [], method: '' };
	return presentLearning(learning, cause);
}

/** The record of what was answered at the time. */
function sayAnew({ cause }: FieldFinding): string {
	const then = cause ? ` The answer then was: ${WORDS[cause.finding].toLowerCase()}.` : '';
	return `Worked out anew for what is agreed now. When it was noted, it was held against what was agreed then.${then}`;
}

/** A note with what the model makes of it; of one that was struck out nothing is made. */
export function presentNote(note: FieldNoteView): NoteReport {
	const { id, kind, notedOn, notedBy, data, struck } = note;
	return {
		...{ id, title: FIELD_NOTE_LABELS[kind], words: sayData(data) },
		when: `${formatDate(notedOn)}, noted by ${notedBy}`,
		struck: struck && {
			...{ who: `Struck out by ${struck.by} on ${formatDate(struck.at)}`, reason: struck.reason }
		},
		...presentFinding(note)
	};
}

const LAWS: Readonly<Record<TrendLaw, string>> = {
	linear: 'by as much each year',
	'square-root': 'ever more slowly'
};

const years = (value: number | null): string => (value === null ? 'more than 30' : formatNumber(value, 1));

const sayYears = ({ low, middle, high }: YearsRange): string =>
	middle === null ? 'more than 30 years' : `${years(middle)} years (${years(low)} to ${years(high)})`;

const ESTIMATE = 'estimate';
const BY_TESTS = 'tests';

type Expected = NonNullable<FieldNotesView['expected']>;

/** The band of a moment between two of its years, by a straight line; a new battery is whole. */
function bandAt(expected: Expected, years: number): { low: number; high: number } | null {
	const points = [{ years: 0, low: 1, middle: 1, high: 1 }, ...expected];
	const after = points.findIndex((point) => point.years >= years);
	if (after < 0) return null;
	const [b, a] = [points[after]!, points[Math.max(after - 1, 0)]!];
	const part = b.years === a.years ? 0 : (years - a.years) / (b.years - a.years);
	return { low: a.low + part * (b.low - a.low), high: a.high + part * (b.high - a.high) };
}

/** On which side of the estimate the last test lies; a test is right to 2 %, which counts as within. */
function saySide(
	tests: readonly { years: number; capacityAh: number }[],
	ratedAh: number,
	expected: Expected
): string {
	const last = tests.at(-1)!;
	const band = bandAt(expected, last.years);
	if (!band) return '';
	const share = last.capacityAh / ratedAh;
	if (share < band.low - TEST_SHARE)
		return 'The last test lies below the estimate: it ages faster than expected.';
	if (share > band.high + TEST_SHARE)
		return 'The last test lies above the estimate: it ages more slowly than expected.';
	return 'The last test agrees with the estimate.';
}
const TEST_SHARE = 0.02;

/** Nothing of years can be read from less: judgement, no source. */
const LEAST_YEARS = 0.5;

/** What tests of the first months say: nothing of how it wears. */
function presentEarly(count: number): TrendReport {
	const tests = count === 1 ? 'one test' : `${count} tests`;
	return {
		sentence: `By ${tests} in its first half year nothing can be said of how it wears. What lies far from its rating by now is no wear: look at how it was tested, and for a fault.`,
		...{ rows: [], named: '', curves: [], tests: [], picture: '' },
		method: 'Where the tests lead is said from half a year after the fitting on.'
	};
}

/** Capacity tests over time, and where they lead; null without a test. */
export function presentTrend({ trend, ratedAh, namedAh, expected }: FieldNotesView): TrendReport | null {
	if (!trend) return null;
	const { tests, projections, honest, toldByTests } = trend;
	if (tests.every(({ years }) => years < LEAST_YEARS)) return presentEarly(tests.length);
	const by = projections.find(({ law }) => law === honest)!;
	const why = toldByTests
		? 'The tests themselves tell which.'
		: 'The tests do not tell the two apart yet: the more careful one is gone by.';
	return {
		sentence: `By ${tests.length === 1 ? 'one test' : `${tests.length} tests`} it is down to 80 % of its rated capacity after ${sayYears(by.toEightyPercent)}, falling ${LAWS[honest]}. ${why}`,
		rows: projections.map(({ law, toEightyPercent, toNamed, points }) => {
			const { low, middle, high } = points[5]!;
			return {
				law: LAWS[law],
				isHonest: law === honest,
				toEighty: sayYears(toEightyPercent),
				toNamed: toNamed ? sayYears(toNamed) : '',
				fiveYears: `${formatPercent(middle)} (${formatPercent(low)} to ${formatPercent(high)})`
			};
		}),
		named: namedAh === null ? '' : formatCapacity(namedAh),
		curves: [
			...(expected && expected.length > 0 ? [{ label: ESTIMATE, years: expected }] : []),
			{ label: BY_TESTS, years: by.points.filter(({ years }) => years > 0) }
		],
		tests: tests.map(({ years, capacityAh }) => ({ years, share: capacityAh / ratedAh })),
		picture: expected
			? `Dots: tests. Band and thick line: what the estimate expected. Dashed: where the tests lead. ${saySide(tests, ratedAh, expected)}`
			: 'Dots: tests. Band and line: where they lead. What the estimate expects is not worked out yet.',
		method:
			'At 25 °C. Nine chances in ten lie in the brackets; a test is taken to be right to 2 %, a new battery to hold its rated capacity to 5 % (judgement).'
	};
}
