import { createRequire } from 'node:module';
import type { Derivative, ReferenceIntegrator } from './integrator';

interface OdexSolver {
	absoluteTolerance: number;
	relativeTolerance: number;
	maxStepSize: number;
	initialStepSize: number;
	maxSteps: number;
	denseOutput: boolean;
	solve: (
		derivative: Derivative,
		from: number,
		state: readonly number[],
		to: number,
		output: (
			count: number,
			from: number,
			to: number,
			state: number[],
			dense?: (index: number, at: number) => number
		) => boolean
	) => unknown;
}

// The package ships its TypeScript source instead of declarations, so its types are written down here.
const { Solver } = createRequire(import.meta.url)('odex') as { Solver: new (size: number) => OdexSolver };

/** Without a cap the extrapolation may step so far that it meets infinities and accepts what is not a number. */
const ODEX_LONGEST_STEP_S = 300;

/** Hairer's extrapolation method, of variable order. */
export function integrateWithOdex(
	toleranceK: number,
	longestStepS = ODEX_LONGEST_STEP_S
): ReferenceIntegrator {
	return (derivative, fromS, state, toS, take) => {
		const solver = new Solver(state.length);
		solver.absoluteTolerance = toleranceK;
		solver.relativeTolerance = 1e-13;
		solver.maxStepSize = longestStepS;
		solver.initialStepSize = Math.min(1, toS - fromS);
		solver.maxSteps = 20_000;
		solver.denseOutput = true;
		solver.solve(derivative, fromS, state, toS, (_count, from, to, end, dense) => {
			if (!dense) return true;
			const read = (timeS: number) =>
				timeS === to ? [...end] : state.map((_, index) => dense(index, timeS));
			return take({ fromS: from, toS: to, read }) === 'go on';
		});
	};
}
