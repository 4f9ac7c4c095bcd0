import { improvedBy } from '$lib/format/improved-by';
import { CHEMISTRY_WORDS, SENSOR_WORDS, UNDER_BONNET } from '$lib/format/batteries';
import { formatClimateZone } from '$lib/format/climate-zones';
import { sayDaysOnRoad } from '$lib/format/days-on-road';
import {
	formatAmps,
	formatCapacity,
	formatKelvin,
	formatMass,
	formatNumber,
	formatPercent,
	formatSpeed,
	formatTemperature,
	formatWithUnit,
	writeNumber
} from '$lib/format/numbers';
import { listSurveyLines } from '$lib/format/survey-lines';
import { formatClock, formatClockHour, formatHours, formatMinutes } from '$lib/format/time';
import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import type { MakerCaution, ReportDerivation, ReportLine, ReportQuestion } from '$lib/schemas/reports';
import { guardOf } from '$lib/thermal/chemistries';
import { questionsFor } from '$lib/thermal/survey';
import { listAssumptions } from '$lib/thermal/survey/answers';

export function listVehicle({ vehicle }: AssessmentInputs): ReportLine[] {
	const { make, model, modelYear, registration, massKg, dragAreaM2, towMassKg, towDragAreaM2 } = vehicle;
	const drag = (areaM2: number) => formatWithUnit(areaM2, 'm²', 2);
	return [
		{ label: 'Vehicle', value: `${make} ${model}, ${modelYear}` },
		...(registration ? [{ label: 'Registration', value: registration }] : []),
		{ label: 'Loaded', value: `${formatMass(massKg)}, drag area ${drag(dragAreaM2)}` },
		...(towMassKg > 0
			? [{ label: 'Trailer', value: `${formatMass(towMassKg)}, adds ${drag(towDragAreaM2)} of drag area` }]
			: [])
	];
}

/** The maker's own words stand here, unless the caution carries them. */
function sayUnderBonnet(inputs: AssessmentInputs): string {
	const { underBonnet, underBonnetWords } = inputs.battery;
	const { short } = UNDER_BONNET[underBonnet];
	return underBonnetWords && !makerCaution(inputs) ? `${short}: “${underBonnetWords}”` : short;
}

/** What stands between it and its heat: the cut-offs of its BMS, or the limits of its maker. */
function listGuard(battery: AssessmentInputs['battery']): ReportLine[] {
	const guard = guardOf(battery);
	if (guard.kind === 'heat-limits') {
		const charger = guard.compensatesCharge
			? 'lowers its voltage as the battery warms'
			: 'does not follow the temperature';
		return [
			{ label: 'Use', value: `up to ${formatTemperature(guard.highestUseC)}; it has no BMS` },
			{ label: 'Charging', value: `up to ${formatTemperature(guard.highestChargeC)}` },
			{ label: 'Its charger', value: charger },
			{ label: 'Rated life', value: `${writeNumber(guard.ratedLifeYears)} years at ${formatTemperature(25)}` }
		];
	}
	const pair = (cutC: number, resetC: number) =>
		`off at ${formatTemperature(cutC)}, back at ${formatTemperature(resetC)}`;
	return [
		{ label: 'Supply', value: pair(guard.dischargeCutC, guard.dischargeResetC) },
		{ label: 'Charging', value: pair(guard.chargeCutC, guard.chargeResetC) },
		{ label: 'Its BMS measures', value: SENSOR_WORDS[guard.sensor].toLowerCase() }
	];
}

export function listBattery(inputs: AssessmentInputs): ReportLine[] {
	const { battery } = inputs;
	const { maker, model, chemistry, capacityAh, lengthMm, widthMm, heightMm, massKg } = battery;
	const size = [lengthMm, widthMm, heightMm].map((each) => formatNumber(each)).join(' × ');
	return [
		{ label: 'Battery', value: `${maker} ${model}, ${formatCapacity(capacityAh)}` },
		{ label: 'Chemistry', value: CHEMISTRY_WORDS[chemistry] },
		{ label: 'Size and mass', value: `${size} mm, ${formatWithUnit(massKg, 'kg', 1)}` },
		...listGuard(battery),
		{ label: 'Under-bonnet use, says its maker', value: sayUnderBonnet(inputs) },
		...(battery.dataSheet ? [{ label: 'Written in', value: battery.dataSheet }] : [])
	];
}

/** Not in assessments from before it was kept. */
function listTouring({ touring }: AssessmentInputs): ReportLine[] {
	if (!touring) return [];
	return [
		{ label: 'Months of the year', value: touring.basis },
		{ label: 'On the road', value: sayDaysOnRoad(touring.daysOnRoad) }
	];
}

export function listHotDay(inputs: AssessmentInputs): ReportLine[] {
	const { place, hotDay, dayPlan } = inputs;
	const where = place.region ? `${place.name}, ${place.region}` : place.name;
	return [
		{ label: 'Place', value: where },
		{ label: 'Climate', value: formatClimateZone(place.climateZone) },
		{ label: 'Altitude', value: formatWithUnit(place.altitudeM, 'm') },
		{
			label: 'Hot day',
			value: `${formatTemperature(hotDay.hotDayMaxC)}, ${formatKelvin(hotDay.dailyRangeK, 0)} less at its coolest`
		},
		{ label: 'Sun at noon', value: formatWithUnit(hotDay.sunPeakWPerM2, 'W/m²') },
		...listTouring(inputs),
		{ label: 'Day plan', value: dayPlan.name },
		{
			label: 'At the start',
			value: `${formatClock(dayPlan.startHour)}, ${formatPercent(dayPlan.startSoc)} charged`
		},
		{ label: 'Charger', value: `up to ${formatAmps(dayPlan.chargerMaxA)}` }
	];
}

type Leg = AssessmentInputs['dayPlan']['legs'][number];

function sayLeg(leg: Leg): string {
	const isMoving = leg.speedKmh > 0;
	const climb =
		leg.gradePercent === 0
			? []
			: [
					`${leg.gradePercent > 0 ? 'climbing' : 'falling'} ${formatWithUnit(Math.abs(leg.gradePercent), '%', 1)}`
				];
	return [
		formatMinutes(leg.minutes),
		...(isMoving ? [formatSpeed(leg.speedKmh), leg.surface, ...climb] : []),
		...(leg.towing ? ['towing'] : []),
		...(leg.engineOn && !isMoving ? ['engine running'] : []),
		...(leg.bonnetOpen ? ['bonnet up'] : []),
		`load ${formatAmps(leg.loadA)}`
	].join(', ');
}

export function listLegs({ dayPlan }: AssessmentInputs, { legs }: AssessmentResult): ReportLine[] {
	return dayPlan.legs.map((leg, index) => ({
		label: `${formatClockHour(legs[index]?.fromHour ?? dayPlan.startHour)} ${leg.kind}`,
		value: sayLeg(leg)
	}));
}

/** What was answered, question by question; an answer that nobody had says what was taken instead. */
export function listSurvey({ mount: { survey } }: AssessmentInputs): ReportQuestion[] {
	return questionsFor(survey.positionKind).map((question) => ({
		title: question.title,
		lines: listSurveyLines(question, survey)
	}));
}

export function listStanding({ mount: { survey }, assumptions }: AssessmentInputs): string[] {
	const ofAnswers = new Set(listAssumptions(survey));
	return assumptions.filter((sentence) => !ofAnswers.has(sentence));
}

/** Four significant digits without an exponent: "0.2768", "12850". */
function formatFigure(value: number): string {
	const decimals = value === 0 ? 0 : Math.max(0, 3 - Math.floor(Math.log10(Math.abs(value))));
	return formatNumber(Number(value.toPrecision(4)), Math.min(decimals, 8))
		.replace(/(\.\d*?)0+$/, '$1')
		.replace(/\.$/, '');
}

/** Parts of the scenario that people entered as they stand. */
const ENTERED = /^(vehicle|bms|charger|start)\b|^climate\.(tMax|dailyRange|sunPeak)$|^battery\.capacityAh$/;

export function listDerivations({ derivations }: AssessmentInputs): ReportDerivation[] {
	return derivations.map(({ path, label, value, unit, basis }) => {
		const figure = typeof value === 'number' ? formatFigure(value) : value;
		return {
			...{ label, basis },
			betterBy: improvedBy(path),
			value: unit === '-' ? figure : `${figure} ${unit}`,
			isEntered: ENTERED.test(path)
		};
	});
}

const MAKER_TITLES: Record<AssessmentInputs['battery']['underBonnet'], string> = {
	allowed: 'With the maker’s word.',
	conditional: 'Only on the maker’s conditions.',
	silent: 'Without the maker’s word.',
	excluded: 'Against the maker’s word.'
};

/** Under a bonnet the maker's own word comes before any figure of ours. */
export function makerCaution({ battery, mount }: AssessmentInputs): MakerCaution | null {
	const { caution } = UNDER_BONNET[battery.underBonnet];
	if (mount.survey.positionKind !== 'under-bonnet' || caution === null) return null;
	const quote = battery.underBonnetWords ? ` It says: “${battery.underBonnetWords}”` : '';
	return { title: MAKER_TITLES[battery.underBonnet], text: `${caution}${quote}` };
}

export const sayDriving = ({ dayPlan }: AssessmentInputs): string => {
	const minutes = dayPlan.legs
		.filter(({ speedKmh }) => speedKmh > 0)
		.reduce((sum, leg) => sum + leg.minutes, 0);
	return `${formatHours(minutes / 60)} on the road`;
};
