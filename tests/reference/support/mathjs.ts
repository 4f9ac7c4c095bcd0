import { all, create } from 'mathjs';
import type { Derivative, Piece, ReferenceIntegrator } from './integrator';

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
