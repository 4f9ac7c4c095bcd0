import { formatDateTime } from '$lib/format/dates';
import { describeVerdict } from '$lib/format/describe-verdict';
import { formatTemperature } from '$lib/format/numbers';
import { formatClock } from '$lib/format/time';
import type { AssessmentView } from '$lib/schemas/assessments';
import type { AssessmentReport, ReportLine } from '$lib/schemas/reports';
import { POSITION_LABELS } from '$lib/thermal/survey';
import { listFigures } from './report-figures';
import {
	listBattery,
	listDerivations,
	listHotDay,
	listLegs,
	listStanding,
	listSurvey,
	listVehicle,
	makerCaution,
	sayDriving
} from './report-inputs';

function listVersions(assessment: AssessmentView): ReportLine[] {
	const { id, inputs, engineVersion, inputsSha256, createdAt, assessedBy } = assessment;
	return [
		{ label: 'Assessment', value: String(id) },
		{ label: 'Made', value: `${formatDateTime(createdAt)}, by ${assessedBy}` },
		{ label: 'Coefficient book', value: `${inputs.book.number}, ${inputs.book.name}` },
		{ label: 'Engine', value: engineVersion },
		{ label: 'Hash of the inputs (SHA-256)', value: inputsSha256 }
	];
}

/** An assessment in words, for the screen and for print. */
export function presentReport(assessment: AssessmentView): AssessmentReport {
	const { inputs, result } = assessment;
	const { mount, place, hotDay, dayPlan } = inputs;
	const campHour = result.legs.find(({ kind }) => kind === 'camp')?.fromHour ?? null;
	const { headline, sentence } = describeVerdict({
		...result,
		campHour,
		chemistry: inputs.battery.chemistry
	});
	return {
		...{ verdict: result.verdict, headline, sentence },
		mount: `Mount ${mount.letter}: ${mount.name}. ${POSITION_LABELS[mount.survey.positionKind]}.`,
		day: `${dayPlan.name}: ${sayDriving(inputs)} from ${formatClock(dayPlan.startHour)}, ${formatTemperature(hotDay.hotDayMaxC)} at ${place.name}.`,
		vehicle: listVehicle(inputs),
		battery: listBattery(inputs),
		figures: listFigures(inputs, result),
		hotDay: listHotDay(inputs),
		legs: listLegs(inputs, result),
		survey: listSurvey(inputs),
		derivations: listDerivations(inputs),
		assumptions: inputs.assumptions,
		standing: listStanding(inputs),
		versions: listVersions(assessment),
		maker: makerCaution(inputs)
	};
}
