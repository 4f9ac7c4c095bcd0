import { formatTemperature } from '$lib/format/numbers';
import { formatClockHour, formatHours } from '$lib/format/time';
import type { AssessmentResult } from '$lib/schemas/assessments';
import type { SheetContent } from '$lib/schemas/sheets';
import { formatOpening, formatVolts } from './lead-acid-figures';

type LeadAcid = NonNullable<AssessmentResult['leadAcid']>;

/** Why a battery that nothing switches off asks for more thought, in plain words. */
export function sayLeadAcid(leadAcid: LeadAcid): string[] {
	const { compensatedChargeV, uncompensatedChargeV, chargerCompensates, openingCm2 } = leadAcid;
	const charger = chargerCompensates
		? 'Its charger sees to that by itself.'
		: 'Its charger does not see to that by itself: ask us about one that does.';
	return [
		`Nothing in this battery switches it off when it is hot. Its maker allows it to be used up to ${formatTemperature(leadAcid.useLimitC)} and charged up to ${formatTemperature(leadAcid.chargeLimitC)}; beyond that it wears out early and gives off more gas.`,
		`A hot battery wants less voltage from its charger: at its hottest on this day about ${formatVolts(compensatedChargeV)} instead of ${formatVolts(uncompensatedChargeV)}. ${charger}`,
		`While it charges it can give off hydrogen, a gas that explodes. Where it stands shut in, it needs two openings to the outside of at least ${formatOpening(openingCm2)} each, one low and one high.`
	];
}

/** Its figures, in plain words. */
export function listLeadAcidSheetFigures(leadAcid: LeadAcid, room: string): SheetContent['figures'] {
	const { useLimitC, tooHotAtHour, hoursAboveUseLimit, hoursAboveChargeLimit } = leadAcid;
	return [
		{ label: 'Its maker allows up to', value: formatTemperature(useLimitC) },
		{ label: 'Room to spare before that', value: room },
		{
			label: 'Hotter than that',
			value:
				tooHotAtHour === null
					? 'not at all'
					: `${formatHours(hoursAboveUseLimit)}, from ${formatClockHour(tooHotAtHour)}`
		},
		{
			label: 'Charged hotter than allowed',
			value: hoursAboveChargeLimit === 0 ? 'not at all' : formatHours(hoursAboveChargeLimit)
		}
	];
}
