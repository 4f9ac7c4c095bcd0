import { onDestroy } from 'svelte';
import type { DoneAssessment } from '../thermal/assess/types';
import type { SurveyInputs } from '../thermal/survey/types';
import { createAssessor, type Assessor, type AssessorSettings } from './client';
import type { LiveSpread } from './messages';

export interface PreviewProblem {
	/** Which input it is about; empty when it is about none. */
	path: string;
	message: string;
}

export interface Preview {
	/** The last assessment that came out; it stays while the next is on its way. */
	readonly current: DoneAssessment | null;
	/** How far it may go otherwise; null until the draws around the current assessment are done. */
	readonly spread: LiveSpread | null;
	readonly busy: boolean;
	readonly problem: PreviewProblem | null;
}

/**
 * An assessment that follows its inputs, for use while a component is set up. `getInputs` reads whatever it needs
 * from reactive state; null while there is not enough to run.
 */
export function createPreview(
	getInputs: () => SurveyInputs | null,
	openAssessor: (settings: AssessorSettings) => Assessor = createAssessor
): Preview {
	let current = $state.raw<DoneAssessment | null>(null);
	let problem = $state.raw<PreviewProblem | null>(null);
	let spread = $state.raw<LiveSpread | null>(null);
	let busy = $state(false);
	let assessor: Assessor | null = null;

	async function run(inputs: SurveyInputs) {
		assessor ??= openAssessor({ onSpread: (heard) => (spread = heard) });
		const outcome = await assessor.assess(inputs);
		if (outcome.status === 'dropped') return;
		busy = false;
		if (outcome.status === 'done') {
			current = outcome;
			spread = null;
			problem = null;
		} else if (outcome.status === 'refused') problem = { path: outcome.path, message: outcome.message };
		else problem = { path: '', message: outcome.reason };
	}

	function clear() {
		assessor?.cancel();
		current = null;
		spread = null;
		problem = null;
		busy = false;
	}

	$effect(() => {
		const inputs = getInputs();
		if (!inputs) {
			clear();
			return;
		}
		const plain = $state.snapshot(inputs) as SurveyInputs;
		busy = true;
		// Nothing is held back: of several that wait only the newest is run.
		void run(plain);
	});

	onDestroy(() => assessor?.dispose());

	return {
		get current() {
			return current;
		},
		get spread() {
			return spread;
		},
		get busy() {
			return busy;
		},
		get problem() {
			return problem;
		}
	};
}
