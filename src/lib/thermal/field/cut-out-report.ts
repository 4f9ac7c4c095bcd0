import { EngineInputError, requireNotBelow, requirePositive } from '../correlations/require';
import { expOf } from '../solve/elementary';
import type { HourSpan } from '../vehicle/spans';

/** What somebody says of a battery that went dark. Hours since midnight of the day; they run on past 24. */
export interface CutOutReport {
	wentDarkHour: number;
	/** Null when nobody knows, or it did not come back by itself. */
	cameBackHour: number | null;
	/** The times as said are right to within this, nine times of ten, h. */
	withinHours: number;
}

/** Of a normal law, so many standard deviations hold nine of ten. */
export const NINE_OF_TEN = 1.6449;
const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);
/** Without heat a battery may have been dark for any time up to this: engineering judgement, h. */
export const LONGEST_DARK_HOURS = 12;

/** Refuses a report that cannot be. */
export function checkReport({ wentDarkHour, cameBackHour, withinHours }: CutOutReport): void {
	requireNotBelow(0, { wentDarkHour });
	requirePositive({ withinHours });
	if (cameBackHour !== null && !(cameBackHour > wentDarkHour)) {
		throw new EngineInputError('cameBackHour', cameBackHour, `after it went dark at ${wentDarkHour}`);
	}
}

function densityPerH(awayHours: number, sigmaHours: number): number {
	const z = awayHours / sigmaHours;
	return expOf((-z * z) / 2) / (sigmaHours * ROOT_TWO_PI);
}

/**
 * How well one run explains what was reported: the density of the reported times about its own, 1/h or 1/h².
 *
 *     L = max over dark spans of φ((dark − from)/σ)/σ · φ((back − to)/σ)/σ,   σ = within/1.6449
 *
 * @param spans when the battery was dark in this run
 * @param report when it was said to be; without a time of coming back the second factor is left out
 * @returns 0 when the run has no dark span
 * Validity: errors of reported times about normal and independent.
 * Source: definition of a likelihood; the law of the errors is engineering judgement.
 * @example
 * const report = { wentDarkHour: 17, cameBackHour: 19, withinHours: 0.5 };
 * weighReport([{ fromHour: 17, toHour: 19, open: false }], report); // 1.7225
 */
export function weighReport(spans: readonly HourSpan[], report: CutOutReport): number {
	const { wentDarkHour, cameBackHour, withinHours } = report;
	const sigmaHours = withinHours / NINE_OF_TEN;
	let best = 0;
	for (const { fromHour, toHour, open } of spans) {
		let density = densityPerH(wentDarkHour - fromHour, sigmaHours);
		// A run that ends in the dark says nothing of when it would have ended, only that it was not before.
		if (cameBackHour !== null) {
			density *=
				open && cameBackHour > toHour
					? 1 / LONGEST_DARK_HOURS
					: densityPerH(cameBackHour - toHour, sigmaHours);
		}
		if (density > best) best = density;
	}
	return best;
}

/** The same density for a cause that has nothing to do with the heat: any time of the day, for any length. */
export function weighAnyTime(report: CutOutReport, dayHours: number): number {
	return report.cameBackHour === null ? 1 / dayHours : 1 / (dayHours * LONGEST_DARK_HOURS);
}

/** Whether a run went dark and came back within what was said. */
export function matchesReport(
	spans: readonly HourSpan[],
	report: CutOutReport
): { when: boolean; both: boolean } {
	const { wentDarkHour, cameBackHour, withinHours } = report;
	const near = spans.filter(({ fromHour }) => Math.abs(fromHour - wentDarkHour) <= withinHours);
	const back = near.some(
		({ toHour }) => cameBackHour === null || Math.abs(toHour - cameBackHour) <= withinHours
	);
	return { when: near.length > 0, both: back };
}
