import { formatKelvin, formatMillimetres, formatTemperature, formatWithUnit } from '$lib/format/numbers';
import { formatClockHour, formatHours } from '$lib/format/time';
import type { AssessmentResult } from '$lib/schemas/assessments';
import type { ReportLine } from '$lib/schemas/reports';
import { chemistryOf, type HeatLimits } from '$lib/thermal/chemistries';

type LeadAcid = NonNullable<AssessmentResult['leadAcid']>;

export const formatVolts = (voltageV: number): string => formatWithUnit(voltageV, 'V', 1);
export const formatOpening = (openingCm2: number): string => formatWithUnit(openingCm2, 'cm²', 0);

function sayTooHot({ tooHotAtHour, hoursAboveUseLimit, useLimitC }: LeadAcid): ReportLine {
	return {
		label: 'Too hot',
		value:
			tooHotAtHour === null
				? 'not on this day'
				: `${formatHours(hoursAboveUseLimit)} from ${formatClockHour(tooHotAtHour)}`,
		note: `Above ${formatTemperature(useLimitC)}; nothing switches it off.`
	};
}

function sayChargedHot({ hoursAboveChargeLimit, chargeLimitC, peakChargingC }: LeadAcid): ReportLine {
	const hottest =
		peakChargingC === null ? 'It is not charged.' : `Charged at up to ${formatTemperature(peakChargingC)}.`;
	return {
		label: 'Charged too hot',
		value: hoursAboveChargeLimit === 0 ? 'not on this day' : formatHours(hoursAboveChargeLimit),
		note: `Its maker allows charging up to ${formatTemperature(chargeLimitC)}. ${hottest}`
	};
}

function sayVoltage({ chemistry }: HeatLimits, leadAcid: LeadAcid, peakCellsC: number): ReportLine {
	const { cells, compensationMvPerKPerCell } = chemistryOf(chemistry);
	const { compensatedChargeV, uncompensatedChargeV, chargerCompensates } = leadAcid;
	const step = formatWithUnit(compensationMvPerKPerCell.value, 'mV/K');
	const charger = chargerCompensates
		? 'The charger sees to it.'
		: `The charger does not: it goes on at ${formatVolts(uncompensatedChargeV)}.`;
	const sum = `${formatVolts(uncompensatedChargeV)} at ${formatTemperature(25)}, and ${cells.value} cells × ${step} × ${formatKelvin(peakCellsC - 25, 0)}`;
	return {
		label: 'Charging voltage at the hottest',
		value: formatVolts(compensatedChargeV),
		note: `${sum}, as is usual. ${charger}`
	};
}

function sayGas({ freshAirM3PerH, openingCm2, sparkFreeMm }: LeadAcid): ReportLine {
	return {
		label: 'Fresh air while it charges',
		value: formatWithUnit(freshAirM3PerH, 'm³/h', 2),
		note: `Hydrogen on boost charge (EN 50272-2): openings to the outside of ${formatOpening(openingCm2)} each, low and high; no spark within ${formatMillimetres(sparkFreeMm)} of a vent.`
	};
}

/** The figures of a battery that nothing switches off. */
export function listLeadAcidFigures(
	limits: HeatLimits,
	leadAcid: LeadAcid,
	peak: ReportLine,
	{ headroomK, peakCellsC }: AssessmentResult
): ReportLine[] {
	return [
		{
			label: 'Headroom',
			value: formatKelvin(headroomK),
			note: `From the peak of the cells to ${formatTemperature(limits.highestUseC)}, the most that its maker allows in use.`
		},
		peak,
		sayTooHot(leadAcid),
		sayChargedHot(leadAcid),
		sayVoltage(limits, leadAcid, peakCellsC),
		sayGas(leadAcid)
	];
}
