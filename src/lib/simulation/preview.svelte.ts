import { onDestroy } from 'svelte';
import type { DoneAssessment } from '../thermal/assess/types';
import type { SurveyInputs } from '../thermal/survey/types';
import { createAssessor, type Assessor } from './client';

export interface PreviewProblem {
	/** Which input it is about; empty when it is about none. */
	path: string;
	message: string;
}

export interface Preview {
	/** The last assessment that came out; it stays while the next is on its way. */
	readonly current: DoneAssessment | null;
	readonly busy: boolean;
	readonly problem: PreviewProblem | null;
}

/** Long enough to skip the steps of a held button, too short to be noticed. */
const DEBOUNCE_MS = 60;

/**
 * An assessment that follows its inputs, for use while a component is set up. `getInputs` reads whatever it needs
 * from reactive state; null while there is not enough to run.
 */
export function createPreview(
	getInputs: () => SurveyInputs | null,
	openAssessor: () => Assessor = createAssessor
): Preview {
	let current = $state.raw<DoneAssessment | null>(null);
	let problem = $state.raw<PreviewProblem | null>(null);
	let busy = $state(false);
	let assessor: Assessor | null = null;

	async function run(inputs: SurveyInputs) {
		assessor ??= openAssessor();
		const outcome = await assessor.assess(inputs);
		if (outcome.status === 'dropped') return;
		busy = false;
		if (outcome.status === 'done') {
			current = outcome;
			problem = null;
		} else if (outcome.status === 'refused') problem = { path: outcome.path, message: outcome.message };
		else problem = { path: '', message: outcome.reason };
	}

	function clear() {
		assessor?.cancel();
		current = null;
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
		const timer = setTimeout(() => void run(plain), DEBOUNCE_MS);
		return () => clearTimeout(timer);
	});

	onDestroy(() => assessor?.dispose());

	return {
		get current() {
			return current;
		},
		get busy() {
			return busy;
		},
		get problem() {
			return problem;
		}
	};
}
