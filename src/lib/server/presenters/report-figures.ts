import { formatAmpHours, formatKelvin, formatTemperature } from '$lib/format/numbers';
import { formatClockHour, formatHours } from '$lib/format/time';
import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import type { ReportLine } from '$lib/schemas/reports';
import { guardOf, type CutOffs } from '$lib/thermal/chemistries';
import type { Sensor } from '$lib/thermal/types';
import { listLeadAcidFigures } from './lead-acid-figures';

const WATCHED: Record<Sensor, string> = {
	cells: 'the cells',
	board: 'the BMS board',
	hotter: 'the hotter of cells and BMS board'
};

function sayReturn({ darkSpans, resetAtHour }: AssessmentResult, autoReset: boolean): ReportLine {
	const label = 'Comes back';
	if (resetAtHour !== null) {
		const again = darkSpans.length > 1 ? 'The first time; it goes dark again.' : undefined;
		return { label, value: formatClockHour(resetAtHour), ...(again ? { note: again } : {}) };
	}
	if (darkSpans.length === 0) return { label, value: 'stays on' };
	const note = autoReset ? undefined : 'This battery waits until somebody switches it on again.';
	return { label, value: 'not within the plan', ...(note ? { note } : {}) };
}

/** Less would be written as 0.0 Ah. */
const LEAST_MISSED_AH = 0.05;

function sayMissed({ chargeMissedAh }: AssessmentResult, chargeCutC: number): ReportLine {
	const label = 'Charge missed';
	if (chargeMissedAh < LEAST_MISSED_AH) return { label, value: 'none' };
	return {
		label,
		value: formatAmpHours(chargeMissedAh),
		note: `Charging stops at ${formatTemperature(chargeCutC)}.`
	};
}

const sayPeak = ({ peakCellsC, peakAtHour }: AssessmentResult): ReportLine => ({
	label: 'Cells hottest',
	value: `${formatTemperature(peakCellsC)} at ${formatClockHour(peakAtHour)}`
});

function listDarkFigures(cutOffs: CutOffs, result: AssessmentResult): ReportLine[] {
	const { headroomK, cutAtHour, darkHours } = result;
	return [
		{
			label: 'Headroom',
			value: formatKelvin(headroomK),
			note: `From the peak of ${WATCHED[cutOffs.sensor]} to ${formatTemperature(cutOffs.dischargeCutC)}, where it goes dark.`
		},
		sayPeak(result),
		{ label: 'Goes dark', value: cutAtHour === null ? 'not on this day' : formatClockHour(cutAtHour) },
		sayReturn(result, cutOffs.autoReset),
		{ label: 'Dark in all', value: darkHours === 0 ? 'none' : formatHours(darkHours) },
		sayMissed(result, cutOffs.chargeCutC)
	];
}

/** The figures beside the picture, in the order in which people ask for them. */
export function listFigures({ battery }: AssessmentInputs, result: AssessmentResult): ReportLine[] {
	const guard = guardOf(battery);
	if (guard.kind === 'cut-offs') return listDarkFigures(guard, result);
	return result.leadAcid ? listLeadAcidFigures(guard, result.leadAcid, sayPeak(result), result) : [];
}
