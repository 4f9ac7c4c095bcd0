import type { ParamMatcher } from '@sveltejs/kit';
import type { MountPaper } from '$lib/schemas/papers';

/** The papers about a fitted mount. */
export const match = ((name): name is MountPaper =>
	name === 'handover' || name === 'warranty-file') satisfies ParamMatcher;
