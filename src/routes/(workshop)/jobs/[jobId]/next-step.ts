import { sayMounts } from '$lib/format/jobs';
import type { JobView } from '$lib/schemas/jobs';

/** The one thing that is to be done next. */
export interface NextStep {
	/** What the button says. */
	label: string;
	/** Why, in one sentence. */
	text: string;
	/** Where it leads; none for what is done by the button itself. */
	href: string | null;
}

type Rule = (job: JobView, at: string) => NextStep | null;

const unfinished = (job: JobView) => job.mounts.find((mount) => !mount.surveyComplete);
const standingOf = (job: JobView, mountId: number) =>
	job.standings.find((standing) => standing.mountId === mountId);

/** Mounts that could be assessed and were not, or were before something changed. */
export const mountsToAssess = (job: JobView) =>
	job.mounts.filter((mount) => {
		const standing = standingOf(job, mount.id);
		return mount.surveyComplete && (!standing || standing.changedSince.length > 0);
	});

/** In the order in which a job is done; the first rule that has something to say is the next step. */
const RULES: readonly Rule[] = [
	(job, at) =>
		job.battery
			? null
			: {
					label: 'Choose the battery',
					text: 'Its size and what its BMS allows decide everything else.',
					href: `${at}/battery`
				},
	(job, at) =>
		job.place && job.hotDay
			? null
			: {
					label: 'Choose the place and hot day',
					text: 'The battery has to live through one hot touring day: say where, and how hot.',
					href: `${at}/climate`
				},
	(job, at) =>
		job.dayPlan
			? null
			: {
					label: 'Draw the day',
					text: 'The legs of the hot day: driving, crawling, stops and camp.',
					href: `${at}/day`
				},
	(job, at) =>
		job.mounts.length > 0
			? null
			: {
					label: 'Add the first position',
					text: 'Where the battery might go. Each position is surveyed with a tape measure.',
					href: `${at}/mounts/new`
				},
	(job) => {
		const mount = unfinished(job);
		return mount
			? {
					label: `Survey mount ${mount.letter}`,
					text: `${mount.name}: the survey is not finished yet.`,
					href: `/mounts/${mount.id}/survey`
				}
			: null;
	},
	(job) => {
		const mounts = mountsToAssess(job);
		if (mounts.length === 0) return null;
		const which = sayMounts(mounts.map((mount) => mount.letter));
		const again = mounts.some((mount) => standingOf(job, mount.id));
		return {
			label: again ? 'Assess again' : 'Assess',
			text: again
				? `Assessed before something changed: ${which}.`
				: `All is there to work out the hot day of ${which}.`,
			href: null
		};
	},
	(job, at) =>
		job.stage === 'assessed' && job.mounts.length > 1
			? {
					label: 'Compare the positions',
					text: 'The same hot day in each of them, side by side; then recommend one.',
					href: `${at}/compare`
				}
			: null,
	(job, at) =>
		job.stage === 'assessed'
			? {
					label: 'Write the recommendation',
					text: 'Two pages for the file, with the cautions and lines to sign.',
					href: `${at}/recommendation`
				}
			: null,
	(job, at) =>
		job.stage === 'recommended'
			? {
					label: 'Send the customer’s sheet',
					text: 'One page in plain words, by a link that can be withdrawn.',
					href: `${at}/sheets`
				}
			: null,
	(job, at) =>
		job.stage === 'sent'
			? {
					label: 'See what was sent',
					text: 'The customer has not acknowledged the sheet yet.',
					href: `${at}/sheets`
				}
			: null
];

/** What is to do next in a job; null when its customer has acknowledged it and nothing changed since. */
export function findNextStep(job: JobView): NextStep | null {
	for (const rule of RULES) {
		const step = rule(job, `/jobs/${job.id}`);
		if (step) return step;
	}
	return null;
}
