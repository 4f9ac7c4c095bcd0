import { sayHeatDifferences } from './fitted';

type Otherwise = readonly { key: string; label: string; fitted: string }[];

/** The answer to "Was it heat?" while the estimate is for something else than what was fitted. */
export const UNJUDGED = 'It cannot be judged yet';

const NEXT = 'Assess the mount as it was fitted, recommend it, and hold the fitting against that.';

/** By whose limits it would be judged, that this is not what was fitted, and what to do. */
export function sayUnjudged(
	{ battery, otherwise }: { battery: string; otherwise: Otherwise },
	word: string
): string {
	const isOther = otherwise.some(({ key }) => key === 'battery');
	const by = isOther
		? `The limits are those of the battery that was agreed, the ${battery}. That battery was not fitted`
		: `The limits are those of the ${battery}, and the estimate is of the mount as it was agreed. It was not fitted so`;
	return `${by} (${sayHeatDifferences(otherwise)}): whether it was heat cannot be judged until the mount is assessed as it was fitted. By what was agreed the answer would be “${word}”, which says nothing of this battery. ${NEXT}`;
}

export const sayTeachesNothing = (otherwise: Otherwise): string =>
	`It teaches nothing yet: the estimate is for what was agreed, not for what was fitted (${sayHeatDifferences(otherwise)}). ${NEXT}`;

/** The same in short, before all answers of a page. */
export const sayOtherwise = (otherwise: Otherwise): string =>
	`The estimate is not of what was fitted (${sayHeatDifferences(otherwise)}): no answer below holds for it yet.`;

/** Several evenings as heat makes them, none of which the estimate explains. */
export const sayDoubt = (evenings: number): string =>
	`${evenings} times by now this battery went dark on the evening of a hot day and came back by itself within hours, as batteries do that got too hot, and the estimate hardly explains it. So the estimate, or what went into it, may be wrong for this mount. Before any other cause: check what was fitted against what was agreed, put a peak label on the case, or a logger on the cells for a hot day, and go through the survey again.`;

export const sayDoubtInShort = (evenings: number): string =>
	`The estimate may be wrong for this mount: ${evenings} evenings contradict it. Measure first, before other causes.`;

/** The same for the customer. */
export const sayDoubtPlainly = (evenings: number): string =>
	`By our estimate heat hardly explains it. But it went like that ${evenings} times, on evenings of hot days, so the estimate may be wrong: the shop measures first.`;

export const UNJUDGED_PLAINLY =
	'Whether that was heat cannot be judged yet: something else was fitted than the estimate was made for. The shop works it out for what was fitted first.';

export const JUDGED_ANEW_PLAINLY =
	'This was worked out anew for what is agreed now; what stood here before does not count.';
