import type { FieldNotesView } from '$lib/schemas/field-notes';
import type { AgreedItem, FittingView } from '$lib/schemas/fitting';
import type { PaperBlock, PaperPhoto } from '$lib/schemas/papers';
import type { PreDrillView } from '$lib/schemas/pre-drill';
import type { ReportLine } from '$lib/schemas/reports';
import type { AcknowledgementView } from '$lib/schemas/sheets';
import { NOT_NOTED } from '$lib/format/agreed-anew';
import { formatDate, formatDateTime } from '$lib/format/dates';
import { isNotNoted, listHeatDifferences, sayFitted, sayHeatDifferences } from '$lib/format/fitted';
import { sayAgainst, sayDecider } from '$lib/format/recommendations';
import { sayVerdict } from '$lib/format/verdict';
import { PRE_DRILL_LABELS } from '$lib/schemas/pre-drill';
import { drawRibbon } from './ribbon-picture';
import type { RecommendationPaper } from './recommendation';

/** Everything that is kept of one fitted battery. */
export interface MountRecord {
	paper: RecommendationPaper;
	fitting: FittingView & { installation: NonNullable<FittingView['installation']> };
	preDrill: PreDrillView;
	notes: FieldNotesView;
	acknowledgement: AcknowledgementView | null;
	/** The picture of the mount first. */
	photos: PaperPhoto[];
}

export const AS_AGREED = 'as agreed';

/** What was agreed and what was fitted, one beside the other. */
export function tellFitted({ agreed, installation }: MountRecord['fitting']): PaperBlock[] {
	const { differences, note } = installation;
	const fittedOf = (item: AgreedItem): string =>
		differences.find(({ key }) => key === item.key)?.fitted ??
		(isNotNoted(item, differences) ? NOT_NOTED : AS_AGREED);
	const ofEstimate = 'The estimate was made for what was agreed.';
	const sentence = [sayFitted(agreed, differences), ...(differences.length > 0 ? [ofEstimate] : [])].join(
		' '
	);
	return [
		{
			...{ kind: 'table', title: 'What was agreed, and what was fitted', empty: '' },
			heads: ['', 'Agreed', 'Fitted'],
			rows: agreed.map((item) => [item.label, item.agreed, fittedOf(item)])
		},
		{ kind: 'words', sentences: [sentence, ...(note ? [`Note: ${note}`] : [])] }
	];
}

const heatDifferencesOf = ({ fitting: { agreed, installation } }: MountRecord) =>
	listHeatDifferences({ agreed, differences: installation.differences });

/** What an estimate has to say before its figures, where something else was fitted; nothing otherwise. */
export function warnOtherwise(record: MountRecord): string[] {
	const otherwise = heatDifferencesOf(record);
	if (otherwise.length === 0) return [];
	return [
		`This was worked out for what was agreed, and not for what was fitted (${sayHeatDifferences(otherwise)}).`
	];
}

/** What was fitted instead, and whose lines the others are; null where all that matters is as agreed. */
function tellOtherwise(record: MountRecord): { instead: ReportLine[]; agreed: ReportLine } | null {
	const otherwise = heatDifferencesOf(record);
	if (otherwise.length === 0) return null;
	const isOther = otherwise.some(({ key }) => key === 'battery');
	const instead = otherwise.map(({ label, fitted }) => ({
		label: `${label}, fitted instead`,
		value: fitted
	}));
	const value = isOther
		? 'The lines that follow are of the battery that was agreed, which is not the one that was fitted'
		: 'The lines that follow are as it was agreed';
	return { instead, agreed: { label: 'As agreed', value } };
}

function tellSerialNumber({ fitting: { installation } }: MountRecord): ReportLine {
	const isOther = installation.differences.some(({ key }) => key === 'battery');
	const label = isOther ? 'Serial number of the fitted battery' : 'Serial number';
	return { label, value: installation.serialNumber || NOT_NOTED };
}

export const tellBattery = (record: MountRecord): PaperBlock => {
	const { paper, fitting } = record;
	const { fittedOn, fittedBy } = fitting.installation;
	const serial = tellSerialNumber(record);
	const position = { label: 'Position', value: paper.report.mount };
	const fitted = { label: 'Fitted', value: `${formatDate(fittedOn)}, by ${fittedBy}` };
	const otherwise = tellOtherwise(record);
	const lines = otherwise
		? [...otherwise.instead, serial, fitted, otherwise.agreed, ...paper.report.battery, position]
		: [...paper.report.battery, serial, position, fitted];
	return { ...{ kind: 'lines', title: 'The battery' }, lines };
};

export const tellVehicle = ({ paper }: MountRecord): PaperBlock => ({
	...{ kind: 'lines', title: 'Customer and vehicle' },
	// Written today, unlike the recommendation in it.
	lines: [
		{ label: 'Customer', value: paper.recommendation.customerNow ?? paper.customer.name },
		...paper.report.vehicle
	]
});

export const tellDay = (record: MountRecord): PaperBlock => {
	const { ribbon, report } = record.paper;
	const caption = [...warnOtherwise(record), `${report.headline}.`, report.sentence, report.day].join(' ');
	return {
		...{ kind: 'picture', title: 'The hot day it was estimated for', svg: drawRibbon(ribbon) },
		caption
	};
};

const monthsAfter = (months: number): string => (months === 1 ? 'one month' : `${months} months`);

export const tellFollowUps = ({ fitting }: MountRecord): PaperBlock => ({
	...{ kind: 'table', title: 'When it is to be looked at', empty: 'No dates are set.' },
	heads: ['After', 'Due', 'Done'],
	rows: fitting.followUps.map(({ afterMonths, dueOn, doneOn, doneBy }) => [
		monthsAfter(afterMonths),
		formatDate(dueOn),
		doneOn ? `${formatDate(doneOn)}, by ${doneBy}` : ''
	])
});

export const tellAgreement = ({ paper, acknowledgement }: MountRecord): PaperBlock => {
	const { recommendation } = paper;
	const { number, createdAt, recommendedBy, reason, assessment } = recommendation;
	const against = sayAgainst(recommendation, assessment);
	const verdict = sayVerdict(assessment.verdict, assessment.chemistry);
	return {
		...{ kind: 'lines', title: 'What was recommended' },
		lines: [
			{ label: `Recommendation ${number}`, value: `${formatDateTime(createdAt)}, by ${recommendedBy}` },
			{ label: 'Verdict', value: verdict },
			...(against
				? [
						{
							label: `Went ahead although ${against}`,
							value: `decided by ${sayDecider(recommendation)}. Reason: ${reason}`
						}
					]
				: []),
			{
				label: 'Read and acknowledged',
				value: acknowledgement
					? `${formatDateTime(acknowledgement.acknowledgedAt)}, by ${acknowledgement.name}`
					: 'not by the customer'
			}
		]
	};
};

export const tellPreDrill = ({ preDrill }: MountRecord): PaperBlock => ({
	...{ kind: 'table', title: 'Checked before drilling', empty: '' },
	heads: ['Point', 'Holds', 'Note'],
	rows: [
		...preDrill.questions.map(({ label, answer, note }) => [
			label,
			answer ? PRE_DRILL_LABELS[answer] : 'not answered',
			note
		]),
		['Signed', preDrill.signedBy ?? 'by nobody', preDrill.signedAt ? formatDateTime(preDrill.signedAt) : '']
	]
});
