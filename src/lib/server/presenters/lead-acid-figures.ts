import { formatKelvin, formatMillimetres, formatTemperature, formatWithUnit } from '$lib/format/numbers';
import { formatClockHour, formatHours } from '$lib/format/time';
import type { AssessmentResult } from '$lib/schemas/assessments';
import type { ReportLine } from '$lib/schemas/reports';
import { chemistryOf, type HeatLimits } from '$lib/thermal/chemistries';

type LeadAcid = NonNullable<AssessmentResult['leadAcid']>;

/** At which a charging voltage is given. */
const REFERENCE_C = 25;

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
	const at25 = formatVolts(uncompensatedChargeV);
	const fall = `${cells.value} cells × ${step} × ${formatKelvin(peakCellsC - REFERENCE_C, 0)}`;
	const charger = chargerCompensates ? 'the charger follows' : `the charger stays at ${at25}`;
	return {
		label: 'Charging voltage at the hottest',
		value: formatVolts(compensatedChargeV),
		note: `Usually ${at25} at ${formatTemperature(REFERENCE_C)}, and ${fall}; ${charger}.`
	};
}

function sayGas({ freshAirM3PerH, openingCm2, sparkFreeMm }: LeadAcid): ReportLine {
	const openings = `Openings of ${formatOpening(openingCm2)} low and high (EN 50272-2, boost)`;
	return {
		label: 'Fresh air for its hydrogen',
		value: formatWithUnit(freshAirM3PerH, 'm³/h', 2),
		note: `${openings}; no spark within ${formatMillimetres(sparkFreeMm)}.`
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
