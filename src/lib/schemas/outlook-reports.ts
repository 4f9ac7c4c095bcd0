import type { ReportLine } from './reports';

/** A value with the range in which it is expected. */
export interface Range {
	low: number;
	middle: number;
	high: number;
}

/** How often a day like the planned one ends in the dark. */
export interface ChanceReport {
	/** Of twenty days, for the picture. */
	ofTwenty: number;
	sentence: string;
	/** "about 11 of 20", for a table. */
	value: string;
	/** How far the number of drawn days goes. */
	interval: string;
	headroom: string;
	/** What the band in the picture of the day means. */
	band: string;
	settled: { draws: string; chance: string; headroom: string }[];
	method: string;
}

export interface MonthReport extends Range {
	name: string;
	/** Its first letter, under the bar. */
	letter: string;
	daysOnRoad: string;
	warmth: string;
	value: string;
}

/** How many days of a year like the customer's. */
export interface YearReport {
	sentence: string;
	/** "9 (4 to 16)". */
	value: string;
	months: MonthReport[];
	basis: string[];
	method: string;
}

export interface UnknownReport {
	label: string;
	/** Of what is not known, 0…1. */
	share: number;
	/** "about a third". */
	words: string;
	/** The same in figures, with its standard error. */
	figure: string;
	measure: string;
	basis: string;
}

/** Which unknowns are worth measuring. */
export interface MeasureReport {
	sentence: string;
	first: UnknownReport[];
	rest: UnknownReport[];
	method: string;
}

export interface RemedyLine {
	/** "Reflective wrap + fresh-air duct". */
	label: string;
	effect: string;
	/** "4.2 K cooler", "0.6 K hotter", "no gain". */
	gain: string;
	parts: string;
	work: string;
	/** "rides it out". */
	verdict: string;
	/** "dark on about 1 of 20"; empty where it was not worked out. */
	chance: string;
	isLeast: boolean;
}

/** What it would take to ride the day out. */
export interface RemedyReport {
	sentence: string;
	alone: RemedyLine[];
	/** What makes it hotter, said plainly; empty where nothing does. */
	hotter: string;
	front: RemedyLine[];
	notTried: string[];
	method: string;
}

/** How hot a day and how long a drive it still rides out. */
export interface EnvelopeReport {
	sentence: string;
	rows: { drive: string; limit: string; range: string }[];
	/** What the picture is drawn from; null where the plan has no driving. */
	picture: EnvelopeFigure | null;
	method: string;
}

export interface EnvelopeFigure {
	triedC: readonly [number, number];
	planned: { driveHours: number; maxC: number };
	points: { driveHours: number; lowC: number | null; middleC: number | null; highC: number | null }[];
}

export interface LifeCurve {
	/** "Here", "B: Behind the seat". */
	label: string;
	/** Share of the first capacity that is left, year by year. */
	years: (Range & { years: number })[];
}

/** How the battery wears, here and in the other mounts. */
export interface LifeReport {
	sentence: string;
	/** "5 to 8 years" to four fifths of its capacity; empty where nobody knows. */
	value: string;
	figures: ReportLine[];
	curves: LifeCurve[];
	/** Of the table of rows: its first column, then the years that are told. */
	heads: string[];
	rows: { label: string; cells: string[] }[];
	beyondTests: string[];
}

export interface CableFindingReport {
	label: string;
	holds: boolean;
	value: string;
	limit: string;
	/** The rule with its source, and how far that can be trusted. */
	source: string;
}

/** A proposed cable and fuse, held against the air of the place. */
export interface CableReport {
	proposal: string;
	sentence: string;
	air: string;
	/** How warm it gets, and what the fuse is worth there. */
	conductor: string;
	findings: CableFindingReport[];
	deference: string;
}

/** What an estimate says beside its number, in words: the same on the screen, on paper and on the customer's page. */
export interface OutlookReport {
	chance: ChanceReport;
	year: YearReport;
	measure: MeasureReport;
	remedies: RemedyReport;
	envelope: EnvelopeReport;
	life: LifeReport;
	cable: CableReport | null;
	/** The three that stand with the figures of the day. */
	figures: ReportLine[];
}
