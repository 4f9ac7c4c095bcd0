import { listCautions } from '$lib/format/cautions';
import { formatDate } from '$lib/format/dates';
import { describeVerdict, type VerdictFacts } from '$lib/format/describe-verdict';
import { dayLimitsOf } from '$lib/format/heat-limits';
import { formatNumber, formatTemperature } from '$lib/format/numbers';
import { formatClock, formatClockHour, formatHours, sayHours } from '$lib/format/time';
import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import { isExcludedAt } from '$lib/schemas/batteries';
import type { PreDrillSnapshot } from '$lib/schemas/pre-drill';
import type { SheetContent, SheetRibbon } from '$lib/schemas/sheets';
import type { Verdict } from '$lib/schemas/verdicts';
import { guardOf, type CutOffs, type HeatGuard } from '$lib/thermal/chemistries';
import type { Sensor } from '$lib/thermal/types';
import { listLeadAcidSheetFigures, sayLeadAcid } from './lead-acid-sheet';
import { makerCaution } from './report-inputs';
import { writeSheetDots } from './sheet-dots';
import { sayBeforeDrilling } from './sheet-pre-drill';
import { writeSheetOutlook, type SheetBeside } from './sheet-outlook';

/** Changes with every change of the sheet's own words: an acknowledgement is tied to what was read. */
export const SHEET_WORDS_VERSION = 6;

/** What a sheet is written from. */
export interface SheetSource {
	workshop: SheetContent['workshop'];
	preparedBy: string;
	preparedAt: Date;
	assessmentId: number;
	/** As the customer is called on the day that it is written. */
	customerName: string;
	inputs: AssessmentInputs;
	result: AssessmentResult;
	override: SheetContent['override'];
	/** The check before drilling as it stood when it was recommended. */
	preDrill: PreDrillSnapshot | null;
	/** As they were issued with the recommendation; null for those from before they were kept. */
	cautions: SheetContent['cautions'] | null;
	/** The newest answer for each other position of the job. */
	others: SheetContent['alternatives'];
	beside: Omit<SheetBeside, 'chemistry' | 'placeName'>;
}

type SheetFigure = SheetContent['figures'][number];

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

function saySwitchingOff({ dischargeCutC, dischargeResetC, autoReset }: CutOffs, verdict: Verdict): string[] {
	if (verdict !== 'cuts-out') return [];
	const back = autoReset
		? `It switches on again by itself once it has cooled to ${formatTemperature(dischargeResetC)}.`
		: 'It does not switch on again by itself: somebody has to do it once it has cooled.';
	return [
		`Going dark is how the battery guards itself: its own electronics switch it off at ${formatTemperature(dischargeCutC)}, and everything that runs from it stops. ${back}`
	];
}

/** What guards it from heat, and what it asks for in the warm. */
function sayGuard({ inputs: { battery }, result }: SheetSource): string[] {
	const guard = guardOf(battery);
	if (guard.kind === 'cut-offs') return saySwitchingOff(guard, result.verdict);
	return result.leadAcid ? sayLeadAcid(result.leadAcid) : [];
}

const DECIDED =
	'It goes ahead all the same, by a decision that is written here. Ask us about anything in it that is not clear to you.';
const ADVICE: Record<HeatGuard['kind'], Record<Verdict, string>> = {
	'cut-offs': {
		'rides-it-out': 'We recommend this position.',
		'runs-close':
			'We recommend this position, with little to spare: on a hotter or longer day than this one the fridge may go dark. Ask us what would give it more room.',
		'cuts-out': 'On a day like this the position does not keep the fridge on.'
	},
	'heat-limits': {
		'rides-it-out': 'We recommend this position.',
		'runs-close':
			'We recommend this position, with little to spare: on a hotter or longer day than this one the battery may get hotter than its maker allows. Ask us what would give it more room.',
		'cuts-out': 'On a day like this the battery gets hotter here than its maker allows.'
	}
};

const MAKER_FORBIDS = 'The battery’s maker does not allow it under the bonnet, however it stands the heat.';

/** What the shop says to it; against the verdict or the maker's word it recommends nothing, and names who decided. */
function sayAdvice({ inputs: { battery, mount }, result: { verdict } }: SheetSource): string {
	const isExcluded = isExcludedAt(battery, mount.survey.positionKind);
	const ofHeat = ADVICE[guardOf(battery).kind][verdict];
	if (verdict !== 'cuts-out') return isExcluded ? `${MAKER_FORBIDS} ${DECIDED}` : ofHeat;
	return [ofHeat, ...(isExcluded ? [MAKER_FORBIDS] : []), DECIDED].join(' ');
}

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

const SWITCHES_OFF: Record<Sensor, string> = {
	cells: 'Switches itself off at',
	board: 'Switches itself off when its electronics reach',
	hotter: 'Switches itself off when its cells or electronics reach'
};

const sayHottest = ({ peakCellsC, peakAtHour }: AssessmentResult): SheetFigure => ({
	label: 'Hottest inside the battery',
	value: `${formatTemperature(peakCellsC)} at ${formatClockHour(peakAtHour)}`
});

function listDarkFigures({ sensor, dischargeCutC }: CutOffs, result: AssessmentResult): SheetFigure[] {
	return [
		{ label: SWITCHES_OFF[sensor], value: formatTemperature(dischargeCutC) },
		{ label: 'Room to spare before that', value: sayRoom(result) },
		{ label: 'Fridge dark', value: sayDark(result) },
		{
			label: 'Charging lost to heat',
			value: result.chargeMissedHours === 0 ? 'none' : formatHours(result.chargeMissedHours)
		}
	];
}

function listFigures({ inputs: { battery }, result }: SheetSource): SheetFigure[] {
	const guard = guardOf(battery);
	if (guard.kind === 'cut-offs') return [sayHottest(result), ...listDarkFigures(guard, result)];
	const own = result.leadAcid ? listLeadAcidSheetFigures(result.leadAcid, sayRoom(result)) : [];
	return [sayHottest(result), ...own];
}

function drawnFrom({ inputs: { battery, mount }, result }: SheetSource): SheetRibbon {
	const { curves, legs, darkSpans, chargeSpans, peakCellsC, peakAtHour } = result;
	return {
		...{ curves, legs, darkSpans, chargeSpans, peakCellsC, peakAtHour },
		position: mount.survey.positionKind,
		limits: dayLimitsOf(battery)
	};
}

/** What the battery's maker says about a place under the bonnet comes before anything of ours. */
function sayMaker({ inputs }: SheetSource): string[] {
	const maker = makerCaution(inputs);
	return maker ? [`${maker.title} ${maker.text}`] : [];
}

/** Writes the customer's page in plain words, once: what is stored is what everybody reads from then on. */
export function writeSheetContent(source: SheetSource): SheetContent {
	const { inputs, result, workshop, preparedBy, override, assessmentId, customerName } = source;
	const { vehicle, battery } = inputs;
	const dots = writeSheetDots(source.beside.outlook.day, battery.chemistry);
	const { headline, sentence: summary } = describeVerdict(
		{ ...factsOf(result), chemistry: battery.chemistry },
		'customer'
	);
	return {
		...{ workshop, preparedBy, override, assessmentId, customerName },
		preparedOn: formatDate(source.preparedAt),
		jobNumber: inputs.jobNumber,
		vehicle: `${vehicle.make} ${vehicle.model}, ${vehicle.modelYear}`,
		chemistry: battery.chemistry,
		battery: `${battery.maker} ${battery.model}, ${formatNumber(battery.capacityAh)} Ah`,
		mountName: inputs.mount.name,
		placeName: inputs.place.name,
		verdict: result.verdict,
		headline,
		summary,
		paragraphs: [...sayMaker(source), sayTheDay(source), ...sayWhyLater(source), ...sayGuard(source)],
		advice: sayAdvice(source),
		beforeDrilling: sayBeforeDrilling(source.preDrill),
		alternatives: source.others,
		figures: listFigures(source),
		outlook: writeSheetOutlook({
			...source.beside,
			chemistry: battery.chemistry,
			placeName: inputs.place.name
		}),
		...(dots ? { dots } : {}),
		ribbon: drawnFrom(source),
		cautions: source.cautions ?? listCautions(battery.chemistry).map(({ title, text }) => ({ title, text }))
	};
}
