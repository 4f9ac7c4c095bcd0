import type { AssessmentView, MountOutcome } from '$lib/schemas/assessments';
import type { OutlookReport } from '$lib/schemas/outlook-reports';
import type { Outlook } from '$lib/schemas/outlooks';
import type { SignedInPerson } from '$lib/schemas/people';
import { presentOutlook } from '../presenters/outlooks';
import { getOutlook, listKeptOutlooks, peekOutlook } from './outlooks';
import { touringOf } from './touring-year';

/** An outlook with its words. */
export interface ToldOutlook {
	outlook: Outlook;
	report: OutlookReport;
}

/** A mount of the job whose battery's years are not worked out yet. */
export interface WaitingMount {
	letter: string;
	name: string;
	assessmentId: number;
}

/** The job's other mounts: what is known of the battery's life there, and where it is not worked out yet. */
export async function lookElsewhere(person: SignedInPerson, others: readonly MountOutcome[]) {
	const assessed = others.flatMap(({ letter, name, assessment }) =>
		assessment ? [{ letter, name, assessmentId: assessment.id }] : []
	);
	const kept = await listKeptOutlooks(
		person,
		assessed.map(({ assessmentId }) => assessmentId)
	);
	const elsewhere = assessed.flatMap(({ letter, name, assessmentId }) => {
		const life = kept.get(assessmentId)?.life;
		return life ? [{ label: `${letter}: ${name}`, name, life }] : [];
	});
	const waiting: WaitingMount[] = assessed.filter(({ assessmentId }) => !kept.has(assessmentId));
	return { elsewhere, waiting };
}

/** What an assessment says beside its number, in words; waits while it is worked out. */
export async function getOutlookReport(
	person: SignedInPerson,
	{ id, inputs }: AssessmentView,
	others: readonly MountOutcome[]
): Promise<ToldOutlook> {
	const outlook = await getOutlook(person, id);
	const { elsewhere } = await lookElsewhere(person, others);
	return { outlook, report: presentOutlook({ inputs, outlook, year: touringOf(inputs), elsewhere }) };
}

/** The same where it is kept; null while it begins to be worked out. Also says which other mounts are still to come. */
export async function peekOutlookReport(
	person: SignedInPerson,
	{ id, inputs }: AssessmentView,
	others: readonly MountOutcome[],
	sayTrouble: (error: unknown) => void
): Promise<{ told: ToldOutlook | null; waiting: WaitingMount[] }> {
	const outlook = await peekOutlook(person, id, sayTrouble);
	const { elsewhere, waiting } = await lookElsewhere(person, others);
	const told = outlook && {
		outlook,
		report: presentOutlook({ inputs, outlook, year: touringOf(inputs), elsewhere })
	};
	return { told, waiting };
}
