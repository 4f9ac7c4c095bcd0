import { formatDate } from '$lib/format/dates';
import { sayMounts } from '$lib/format/jobs';
import type { FittedMount, Mismatch } from '$lib/schemas/fitting';
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

/** What the next step is found from, beside the job itself. */
export interface Around {
	/** The mount of the newest recommendation. */
	recommendedMountId: number | null;
	fitted: readonly FittedMount[];
}

type Rule = (job: JobView, at: string, around: Around) => NextStep | null;

const isFitted = ({ fitted }: Around, mountId: number | null) =>
	fitted.some((each) => each.mountId === mountId);

/** Once the recommended battery is in, the positions that were not chosen ask for nothing more. */
const openMounts = (job: JobView, around: Around) =>
	isFitted(around, around.recommendedMountId)
		? job.mounts.filter((mount) => isFitted(around, mount.id))
		: job.mounts;

const unfinished = (job: JobView, around: Around) =>
	openMounts(job, around).find((mount) => !mount.surveyComplete);
const standingOf = (job: JobView, mountId: number) =>
	job.standings.find((standing) => standing.mountId === mountId);

/** Mounts that could be assessed and were not, or were before something changed. */
const mountsToAssess = (job: JobView, around: Around) =>
	openMounts(job, around).filter((mount) => {
		const standing = standingOf(job, mount.id);
		return mount.surveyComplete && (!standing || standing.changedSince.length > 0);
	});

/** To assess these mounts, by the button itself. */
function sayAssess(letters: readonly string[], again: boolean): NextStep {
	const which = sayMounts([...letters]);
	return {
		label: again ? 'Assess again' : 'Assess',
		text: again
			? `Assessed before something changed: ${which}.`
			: `All is there to work out the hot day of ${which}.`,
		href: null
	};
}

type MismatchStep = (mount: FittedMount, at: string) => NextStep;

/** From another battery in a mount to an estimate, a recommendation and papers of that battery. */
const MISMATCH_STEPS: Readonly<Record<Mismatch, MismatchStep>> = {
	assess: ({ letter }, at) => ({
		label: 'Assess it as it was fitted',
		text: `Mount ${letter} has another battery than was agreed, of which nothing is worked out: choose the fitted one here, then assess again.`,
		href: `${at}/battery`
	}),
	recommend: ({ letter }, at) => ({
		label: 'Recommend it as it was fitted',
		text: `Mount ${letter} is assessed with another battery than was agreed: recommend that, then hold the fitting against it.`,
		href: `${at}/recommendation`
	}),
	hold: ({ letter, mountId }) => ({
		label: 'Hold the fitting against the newer recommendation',
		text: `What was fitted at mount ${letter} is still held against the earlier one: its papers and answers are of another battery.`,
		href: `/mounts/${mountId}/fitted#agreement`
	})
};

/** In the order in which a job is done; the first rule that has something to say is the next step. */
const RULES: readonly Rule[] = [
	// Before a look that is due: whoever looks would hold what is found against another battery.
	(job, at, { fitted }) => {
		const other = fitted.find(({ mismatch }) => mismatch !== null);
		if (!other?.mismatch) return null;
		const changed = standingOf(job, other.mountId)?.changedSince ?? [];
		const isToAssess = other.mismatch === 'assess' ? changed.includes('battery') : changed.length > 0;
		return isToAssess && other.mismatch !== 'hold'
			? sayAssess([other.letter], true)
			: MISMATCH_STEPS[other.mismatch](other, at);
	},
	(_, __, { fitted }) => {
		const late = fitted.find(({ isOverdue }) => isOverdue);
		return late?.nextDueOn
			? {
					label: `Look at mount ${late.letter}`,
					text: `The look at mount ${late.letter} was due on ${formatDate(late.nextDueOn)}, and nobody has noted it as done.`,
					href: `/mounts/${late.mountId}/fitted#dates`
				}
			: null;
	},
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
	(job, _, around) => {
		const mount = unfinished(job, around);
		return mount
			? {
					label: `Survey mount ${mount.letter}`,
					text: `${mount.name}: the survey is not finished yet.`,
					href: `/mounts/${mount.id}/survey`
				}
			: null;
	},
	(job, _, around) => {
		const mounts = mountsToAssess(job, around);
		if (mounts.length === 0) return null;
		const again = mounts.some((mount) => standingOf(job, mount.id));
		return sayAssess(
			mounts.map((mount) => mount.letter),
			again
		);
	},
	(job, at, around) =>
		job.stage === 'recommended' && isFitted(around, around.recommendedMountId)
			? {
					label: 'Send the customer’s sheet',
					text: 'The battery is fitted, but what was recommended has not gone to the customer.',
					href: `${at}/sheets`
				}
			: null,
	(_, __, around) => {
		if (!isFitted(around, around.recommendedMountId)) return null;
		const [next] = around.fitted
			.filter(({ nextDueOn }) => nextDueOn !== null)
			.sort((a, b) => a.nextDueOn!.localeCompare(b.nextDueOn!));
		return next
			? {
					label: 'See the dates',
					text: `The battery is fitted. Mount ${next.letter} is to be looked at next on ${formatDate(next.nextDueOn!)}.`,
					href: `/mounts/${next.mountId}/fitted#dates`
				}
			: {
					label: 'Note what the field says',
					text: 'The battery is fitted and every look at it is done: nothing is left to do here.',
					href: `/mounts/${around.recommendedMountId}/field`
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
			: null,
	(job, _, { recommendedMountId }) =>
		job.stage === 'acknowledged' && recommendedMountId !== null
			? {
					label: 'Say what was fitted',
					text: 'The customer has acknowledged the sheet. What comes next is the fitting, and what the field says of it.',
					href: `/mounts/${recommendedMountId}/fitted`
				}
			: null
];

/** What is to do next in a job; none where its stage has no rule. */
export function findNextStep(job: JobView, around: Around): NextStep | null {
	for (const rule of RULES) {
		const step = rule(job, `/jobs/${job.id}`, around);
		if (step) return step;
	}
	return null;
}
