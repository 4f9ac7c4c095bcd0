import { createRequire } from 'node:module';
import { all, create } from 'mathjs';

export type Derivative = (timeS: number, state: readonly number[]) => number[];

/** A piece of the solution that can be read anywhere inside. */
export interface Piece {
	fromS: number;
	toS: number;
	read: (timeS: number) => number[];
}

/** Integrates from one instant to another and hands out pieces in order until `take` says stop. */
export type ReferenceIntegrator = (
	derivative: Derivative,
	fromS: number,
	state: readonly number[],
	toS: number,
	take: (piece: Piece) => 'go on' | 'stop'
) => void;

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

interface OdeSolution {
	t: number[];
	y: number[][];
}
// solveODE is missing from the declarations that mathjs ships.
const math = create(all!, {}) as ReturnType<typeof create> & {
	solveODE: (
		derivative: Derivative,
		span: [number, number],
		state: number[],
		options: Record<string, unknown>
	) => OdeSolution;
};

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

/** Between two steps of a method that has no dense output: the cubic through both ends and both slopes. */
function readCubic(derivative: Derivative, fromS: number, from: number[], toS: number, to: number[]): Piece {
	const length = toS - fromS;
	let slopes: [number[], number[]] | null = null;
	const read = (timeS: number) => {
		if (timeS === toS) return [...to];
		slopes ??= [derivative(fromS, from), derivative(toS, to)];
		const [begin, end] = slopes;
		const s = (timeS - fromS) / length;
		const r = 1 - s;
		return from.map(
			(value, k) =>
				value * r * r * (1 + 2 * s) +
				to[k]! * s * s * (3 - 2 * s) +
				length * s * r * (begin[k]! * r - end[k]! * s)
		);
	};
	return { fromS, toS, read };
}

const MATHJS_CHUNK_S = 900;

/** The Dormand–Prince pair of mathjs, in chunks because it cannot be stopped. Its tolerance is in K/s. */
export function integrateWithMathjs(toleranceKPerS: number, longestStepS: number): ReferenceIntegrator {
	return (derivative, fromS, state, toS, take) => {
		let begin = fromS;
		let now = [...state];
		while (begin < toS) {
			const end = Math.min(begin + MATHJS_CHUNK_S, toS);
			const solution = math.solveODE(derivative, [begin, end], now, {
				method: 'RK45',
				tol: toleranceKPerS,
				firstStep: Math.min(1, end - begin),
				maxStep: longestStepS,
				minStep: 1e-9,
				maxIter: 1e6
			});
			for (let k = 1; k < solution.t.length; k++) {
				const piece = readCubic(
					derivative,
					solution.t[k - 1]!,
					solution.y[k - 1]!,
					solution.t[k]!,
					solution.y[k]!
				);
				if (take(piece) === 'stop') return;
			}
			begin = end;
			now = solution.y.at(-1)!;
		}
	};
}

/** Matrix exponential of mathjs, as plain arrays. */
export function exponentiate(matrix: number[][]): number[][] {
	return math.expm(math.matrix(matrix)).toArray() as number[][];
}
