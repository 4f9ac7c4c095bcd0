import type { Verdict } from './verdicts';

/** A line with its value in words, and what else there is to say about it. */
export interface ReportLine {
	label: string;
	value: string;
	note?: string;
}

/** One question of the survey with what was answered, field by field. */
export interface ReportQuestion {
	title: string;
	lines: ReportLine[];
}

export interface ReportDerivation {
	label: string;
	value: string;
	/** The formula with its numbers, and where it comes from. */
	basis: string;
	/** What measurement would make it better known. */
	betterBy: string;
	/** Taken as it was entered, and told among the inputs already. */
	isEntered: boolean;
}

/** What the battery's maker says of the place that was chosen. */
export interface MakerCaution {
	title: string;
	text: string;
}

/** An assessment in words: the same on the screen and in print. */
export interface AssessmentReport {
	verdict: Verdict;
	headline: string;
	/** What happens to the person. */
	sentence: string;
	/** Which mount, on which day, where. */
	mount: string;
	day: string;
	vehicle: ReportLine[];
	battery: ReportLine[];
	figures: ReportLine[];
	hotDay: ReportLine[];
	legs: ReportLine[];
	survey: ReportQuestion[];
	derivations: ReportDerivation[];
	/** One sentence for each thing that nobody measured. */
	assumptions: string[];
	/** Those of them that the answers to the survey do not show by themselves. */
	standing: string[];
	versions: ReportLine[];
	maker: MakerCaution | null;
}
