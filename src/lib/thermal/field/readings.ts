import { EngineInputError, requirePositive } from '../correlations/require';
import { normalCdf } from '../statistics';
import { expOf } from '../solve/elementary';
import type { HourSpan } from '../vehicle/spans';
import { checkReport, NINE_OF_TEN, weighReport, type CutOutReport } from './cut-out-report';

/** Where a thermometer or a label can be on a battery. */
export const READING_PLACES = ['case', 'cells', 'board'] as const;
export type ReadingPlace = (typeof READING_PLACES)[number];

/** One measurement in the field, with how exactly it is known. */
export type FieldReading =
	| {
			kind: 'peak-label';
			place: ReadingPlace;
			/** The highest field that has turned, and the lowest that has not, °C; null when none has, or all have. */
			turnedC: number | null;
			notTurnedC: number | null;
			/** The label's own tolerance, nine times of ten, K. */
			withinK: number;
	  }
	| { kind: 'thermometer'; place: ReadingPlace; hour: number; tempC: number; withinK: number }
	| { kind: 'cut-out'; report: CutOutReport };

/** What a run has of the day of a reading. */
export interface RunForReading {
	spans: readonly HourSpan[];
	peakC: number;
	/** At the hour of the reading, °C; NaN outside the day. */
	tempC: number;
}

/**
 * Refuses a reading that cannot be.
 *
 * @param reading a label, a thermometer or a report, °C, h and K
 * @returns nothing
 * @throws EngineInputError with the field that cannot be: fields of a label out of order or all missing, a tolerance not above 0
 * Validity: what is refused says nothing of the estimate.
 * Source: our own.
 * @example
 * checkReading({ kind: 'thermometer', place: 'case', hour: 15, tempC: 52, withinK: 1 }); // undefined
 */
export function checkReading(reading: FieldReading): void {
	if (reading.kind === 'cut-out') {
		checkReport(reading.report);
		return;
	}
	requirePositive({ withinK: reading.withinK });
	if (reading.kind === 'thermometer') return;
	const { turnedC, notTurnedC } = reading;
	if (turnedC === null && notTurnedC === null) {
		throw new EngineInputError('turnedC', NaN, 'given, or the lowest field that has not turned');
	}
	if (turnedC !== null && notTurnedC !== null && !(notTurnedC > turnedC)) {
		throw new EngineInputError(
			'notTurnedC',
			notTurnedC,
			`above the highest field that has turned, ${turnedC} °C`
		);
	}
}

/**
 * How well a run agrees with a reading; only ratios between runs mean something.
 *
 *     label: Φ((notTurned − peak)/σ) − Φ((turned − peak)/σ);   thermometer: exp(−((T − reading)/σ)²/2);   σ = within/1.6449
 *
 * @param reading what was read
 * @param run what a run has of that day
 * @returns not below 0
 * Validity: errors of readings about normal.
 * Source: definition of a likelihood for a value within limits and for a value read.
 * @example
 * const label = { kind: 'peak-label', place: 'case', turnedC: 60, notTurnedC: 65, withinK: 1.6449 };
 * weighReading(label, { spans: [], peakC: 62.5, tempC: NaN }); // 0.98758
 */
export function weighReading(reading: FieldReading, { spans, peakC, tempC }: RunForReading): number {
	if (reading.kind === 'cut-out') return weighReport(spans, reading.report);
	const sigmaK = reading.withinK / NINE_OF_TEN;
	if (reading.kind === 'thermometer') {
		const z = (tempC - reading.tempC) / sigmaK;
		return z === z ? expOf((-z * z) / 2) : 0;
	}
	const below = reading.notTurnedC === null ? 1 : normalCdf((reading.notTurnedC - peakC) / sigmaK);
	const above = reading.turnedC === null ? 0 : normalCdf((reading.turnedC - peakC) / sigmaK);
	return Math.max(below - above, 0);
}
