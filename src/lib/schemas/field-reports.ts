import type { LifeCurve } from './outlook-reports';

/** A note of the field in words. */
export interface NoteReport {
	id: number;
	title: string;
	when: string;
	words: string;
	/** By whom, when and why it was struck out; null where it counts. */
	struck: { who: string; reason: string } | null;
	cause: {
		/** "Yes", "Perhaps", "Hardly", or that it cannot be judged. */
		word: string;
		sentence: string;
		usual: string;
		/** Why the estimate itself may be wrong, before any other cause is looked for; empty where nothing speaks for it. */
		doubt: string;
		others: { label: string; measure: string }[];
	} | null;
	/** What was said when it was noted, and that it was worked out anew since; empty where it was not. */
	anew: string;
	learning: {
		sentence: string;
		rows: { label: string; before: string; after: string }[];
		method: string;
	} | null;
}

/** Where a capacity goes, in words. */
export interface TrendReport {
	sentence: string;
	rows: { law: string; isHonest: boolean; toEighty: string; toNamed: string; fiveYears: string }[];
	/** "70 Ah"; empty where nobody asked. */
	named: string;
	/** The estimate's own band first, where there is one; then what the tests lead to. */
	curves: LifeCurve[];
	tests: { years: number; share: number }[];
	picture: string;
	method: string;
}
