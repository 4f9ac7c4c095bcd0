import { formatAmps } from '$lib/format/numbers';
import {
	NOT_PROPOSED,
	type AgreedItem,
	type AgreementView,
	type FittingView,
	type FollowUpView
} from '$lib/schemas/fitting';
import type { SurveyAnswers } from '$lib/schemas/survey';
import { describeAssumed, SURVEY_FIELDS } from '$lib/thermal/survey';
import type { Assessment, FollowUp, Installation, Mount, Recommendation } from '../db/models';
import { sayProposal } from './outlook/cable';

/** Today, and the last day of which a look today would not be early. */
interface Days {
	now: string;
	soon: string;
}

const SHIELD = SURVEY_FIELDS.shieldKind;

/** In the words of the survey; where nobody said, as it was taken to be. */
function sayShield({ shieldKind }: SurveyAnswers): string {
	return SHIELD.choices.find(({ value }) => value === shieldKind)?.label ?? describeAssumed(SHIELD);
}

/** What was agreed with an assessment, in the words of a list to tick off. */
export function listAgreed({ inputs }: Assessment): AgreedItem[] {
	const { battery, mount, cable, dayPlan } = inputs;
	return [
		{ key: 'battery', label: 'Battery', agreed: `${battery.maker} ${battery.model}` },
		{ key: 'position', label: 'Position', agreed: `${mount.letter}: ${mount.name}` },
		{ key: 'shield', label: 'Shield', agreed: sayShield(mount.survey) },
		{ key: 'cable', label: 'Cable', agreed: cable ? sayProposal(cable) : NOT_PROPOSED },
		{ key: 'fuse', label: 'Fuse', agreed: cable ? formatAmps(cable.fuseRatedA) : NOT_PROPOSED },
		{ key: 'charger', label: 'Charger', agreed: `at most ${formatAmps(dayPlan.chargerMaxA)}` }
	];
}

const presentFollowUp = (
	{ id, afterMonths, dueOn, doneOn, doneBy, version }: FollowUp,
	{ now, soon }: Days
): FollowUpView => ({
	...{ id, afterMonths, dueOn, version },
	doneOn: doneOn ?? null,
	doneBy: doneBy ?? null,
	isOverdue: (doneOn ?? null) === null && dueOn < now,
	isEarly: (doneOn ?? null) === null && dueOn > soon
});

/** What the fitting is held against, and the recommendations of its mount around it. */
export interface Agreed {
	assessment: Assessment;
	held: Recommendation;
	newest: Recommendation;
	first: Recommendation;
}

const presentAgreement = ({ id, number, createdAt }: Recommendation): AgreementView => ({
	...{ id, number },
	recommendedAt: createdAt.toISOString()
});

export function presentFitting(
	{ id: mountId, jobId }: Mount,
	{ assessment, held, newest, first }: Agreed,
	installation: Installation | null,
	followUps: readonly FollowUp[],
	days: Days
): FittingView {
	return {
		...{ mountId, jobId, assessmentId: assessment.id, agreedAt: first.createdAt.toISOString() },
		recommendation: presentAgreement(held),
		newer: newest.id > held.id ? presentAgreement(newest) : null,
		agreed: installation?.agreed ?? listAgreed(assessment),
		installation: installation && {
			id: installation.id,
			fittedOn: installation.fittedOn,
			fittedBy: installation.fittedBy,
			serialNumber: installation.serialNumber,
			note: installation.note,
			differences: installation.differences,
			version: installation.version
		},
		followUps: followUps.map((followUp) => presentFollowUp(followUp, days))
	};
}
