import type { LeadAcidFigures } from '../thermal/assess/types';
import type { Verdict } from './verdict';

/** What the sentence needs of an assessment; hours run on past 24. */
export interface VerdictFacts {
	verdict: Verdict;
	cutAtHour: number | null;
	resetAtHour: number | null;
	backByItself: boolean;
	darkHours: number;
	headroomK: number;
	peakCellsC: number;
	peakAtHour: number;
	chargeMissedAh: number;
	chargeMissedHours: number;
	/** When the day reaches camp, if it does. */
	campHour?: number | null;
	/** Of a battery that nothing switches off. */
	leadAcid?: LeadAcidFigures;
}

/** The workshop hears temperatures; the customer hears what happens. */
export type Audience = 'workshop' | 'customer';
