import { listCautions } from '$lib/format/cautions';
import { formatDate } from '$lib/format/dates';
import { describeVerdict, type VerdictFacts } from '$lib/format/describe-verdict';
import { formatNumber, formatTemperature } from '$lib/format/numbers';
import { formatClock, formatClockHour, formatHours, sayHours } from '$lib/format/time';
import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import type { SheetContent, SheetRibbon } from '$lib/schemas/sheets';
import type { Verdict } from '$lib/schemas/verdicts';
import { makerCaution } from './report-inputs';

/** Changes with every change of the sheet's own words: an acknowledgement is tied to what was read. */
export const SHEET_WORDS_VERSION = 2;

/** What a sheet is written from. */
export interface SheetSource {
	workshop: SheetContent['workshop'];
	preparedBy: string;
	preparedAt: Date;
	assessmentId: number;
	inputs: AssessmentInputs;
	result: AssessmentResult;
	override: SheetContent['override'];
	/** The newest answer for each other position of the job. */
	others: SheetContent['alternatives'];
}

const LATER_H = 0.75;
const MINUTES_AN_HOUR = 60;

function campHourOf({ legs }: AssessmentResult): number | null {
	return legs.find((leg) => leg.kind === 'camp')?.fromHour ?? null;
}

function factsOf(result: AssessmentResult): VerdictFacts {
	return { ...result, campHour: campHourOf(result) };
}

function sayTheDay({ inputs: { hotDay, place, dayPlan, vehicle }, result }: SheetSource): string {
	const drivingMinutes = dayPlan.legs
		.filter((leg) => leg.kind === 'drive' || leg.kind === 'crawl')
		.reduce((sum, leg) => sum + leg.minutes, 0);
	const towing = vehicle.towMassKg > 0 && dayPlan.legs.some((leg) => leg.towing) ? ', towing' : '';
	const camp = campHourOf(result);
	const arrival = camp === null ? '' : `, camp at ${formatClockHour(camp)}`;
	return (
		`This is for one hot day at ${place.name}: ${formatTemperature(hotDay.hotDayMaxC)} outside at its hottest, ` +
		`off at ${formatClock(dayPlan.startHour)}, ${formatHours(drivingMinutes / MINUTES_AN_HOUR)} on the road${towing}${arrival}. ` +
		'A hotter or longer day is harder on the battery, a milder one easier.'
	);
}

function hottestHourOutside({ curves }: AssessmentResult): number {
	const index = curves.ambientC.indexOf(Math.max(...curves.ambientC));
	return curves.startHour + (index * curves.stepMin) / MINUTES_AN_HOUR;
}

/** The hottest hour under a bonnet is not the hottest hour of the day: said where this day shows it. */
function sayWhyLater({ inputs, result }: SheetSource): string[] {
	const later = result.peakAtHour - hottestHourOutside(result);
	if (inputs.mount.survey.positionKind !== 'under-bonnet' || later < LATER_H) return [];
	return [
		`The battery is at its hottest about ${sayHours(later)} after the hottest hour outside: it holds heat for hours, and the engine bay warms up again each time the engine stops.`
	];
}

function saySwitchingOff({ inputs: { battery }, result }: SheetSource): string[] {
	if (result.verdict !== 'cuts-out') return [];
	const back = battery.autoReset
		? `It switches on again by itself once it has cooled to ${formatTemperature(battery.dischargeResetC)}.`
		: 'It does not switch on again by itself: somebody has to do it once it has cooled.';
	return [
		`Going dark is how the battery guards itself: its own electronics switch it off at ${formatTemperature(battery.dischargeCutC)}, and everything that runs from it stops. ${back}`
	];
}

const ADVICE: Record<Verdict, string> = {
	'rides-it-out': 'We recommend this position.',
	'runs-close':
		'We recommend this position, with little to spare: on a hotter or longer day than this one the fridge may go dark. Ask us what would give it more room.',
	'cuts-out':
		'On a day like this the position does not keep the fridge on. It goes ahead all the same, by a decision that is written here. Ask us about anything in it that is not clear to you.'
};

function sayDark({ darkHours, cutAtHour, resetAtHour, darkSpans }: AssessmentResult): string {
	if (darkHours === 0 || cutAtHour === null) return 'not at all';
	const until = resetAtHour === null ? 'to the end of the plan' : `to ${formatClockHour(resetAtHour)}`;
	const length = formatHours(darkHours);
	return darkSpans.length > 1
		? `${length} in all, first at ${formatClockHour(cutAtHour)}`
		: `${length}, from ${formatClockHour(cutAtHour)} ${until}`;
}

function sayRoom({ headroomK }: AssessmentResult): string {
	const degrees = formatNumber(headroomK);
	if (headroomK <= 0) return 'none';
	return headroomK < 1 ? 'less than 1 degree' : `${degrees} ${degrees === '1' ? 'degree' : 'degrees'}`;
}

const SWITCHES_OFF: Record<SheetSource['inputs']['battery']['sensor'], string> = {
	cells: 'Switches itself off at',
	board: 'Switches itself off when its electronics reach',
	hotter: 'Switches itself off when its cells or electronics reach'
};

function listFigures({ inputs: { battery }, result }: SheetSource): SheetContent['figures'] {
	return [
		{
			label: 'Hottest inside the battery',
			value: `${formatTemperature(result.peakCellsC)} at ${formatClockHour(result.peakAtHour)}`
		},
		{
			label: SWITCHES_OFF[battery.sensor],
			value: formatTemperature(battery.dischargeCutC)
		},
		{ label: 'Room to spare before that', value: sayRoom(result) },
		{ label: 'Fridge dark', value: sayDark(result) },
		{
			label: 'Charging lost to heat',
			value: result.chargeMissedHours === 0 ? 'none' : formatHours(result.chargeMissedHours)
		}
	];
}

function drawnFrom({ inputs: { battery, mount }, result }: SheetSource): SheetRibbon {
	const { curves, legs, darkSpans, chargeSpans, peakCellsC, peakAtHour } = result;
	const { dischargeCutC, dischargeResetC, chargeCutC, chargeResetC, sensor } = battery;
	return {
		...{ curves, legs, darkSpans, chargeSpans, peakCellsC, peakAtHour },
		position: mount.survey.positionKind,
		limits: { dischargeCutC, dischargeResetC, chargeCutC, chargeResetC, sensor }
	};
}

/** What the battery's maker says about a place under the bonnet comes before anything of ours. */
function sayMaker({ inputs }: SheetSource): string[] {
	const maker = makerCaution(inputs);
	return maker ? [`${maker.title} ${maker.text}`] : [];
}

/** Writes the customer's page in plain words, once: what is stored is what everybody reads from then on. */
export function writeSheetContent(source: SheetSource): SheetContent {
	const { inputs, result, workshop, preparedBy, override, assessmentId } = source;
	const { vehicle, battery } = inputs;
	const { headline, sentence: summary } = describeVerdict(factsOf(result), 'customer');
	return {
		...{ workshop, preparedBy, override, assessmentId },
		preparedOn: formatDate(source.preparedAt),
		jobNumber: inputs.jobNumber,
		customerName: inputs.customerName,
		vehicle: `${vehicle.make} ${vehicle.model}, ${vehicle.modelYear}`,
		battery: `${battery.maker} ${battery.model}, ${formatNumber(battery.capacityAh)} Ah`,
		mountName: inputs.mount.name,
		placeName: inputs.place.name,
		verdict: result.verdict,
		headline,
		summary,
		paragraphs: [...sayMaker(source), sayTheDay(source), ...sayWhyLater(source), ...saySwitchingOff(source)],
		advice: ADVICE[result.verdict],
		alternatives: source.others,
		figures: listFigures(source),
		ribbon: drawnFrom(source),
		cautions: listCautions(battery.chemistry).map(({ title, text }) => ({ title, text }))
	};
}
