import { RODAS, STAGES } from '../../solve/rodas';

/** The weights with which the method itself sums the heats of a step. */
export interface HeatWeights {
	/** bᵢ of the heats at the stages, and of the stages' uᵢ in the term with the Jacobian. */
	stages: number[];
	/** Of h ∂H/∂t. */
	timeDerivative: number;
}

/** Inverse of the lower triangle (1/γ) I − c. */
function invertStages(): number[][] {
	const { gamma, c } = RODAS;
	const inverse: number[][] = [];
	for (let row = 0; row < STAGES; row++) {
		const line = new Array<number>(STAGES).fill(0);
		line[row] = gamma;
		for (let other = 0; other < row; other++) {
			const factor = gamma * c[row]![other]!;
			for (let column = 0; column <= other; column++) line[column]! += factor * inverse[other]![column]!;
		}
		inverse.push(line);
	}
	return inverse;
}

/**
 * How much heat a step moves, in terms of what the stages saw.
 *
 *     C ΔT = h [Σ bᵢ Hᵢ + (Σ bᵢdᵢ) h ∂H/∂t + J Σ bᵢuᵢ],   b = Γᵀ m,   Γ = ((1/γ) I − c)⁻¹
 *
 * Source: Hairer, Wanner, Solving Ordinary Differential Equations II, 2nd ed., equations IV.7.25 to IV.7.26, solved for bᵢ.
 */
export function findHeatWeights(): HeatWeights {
	const gammas = invertStages();
	const m = [...RODAS.a[STAGES - 1]!, 1];
	const stages = m.map((_, column) =>
		m.reduce((sum, weight, row) => sum + weight * gammas[row]![column]!, 0)
	);
	const timeDerivative = stages.reduce((sum, weight, row) => sum + weight * RODAS.timeDerivative[row]!, 0);
	return { stages, timeDerivative };
}
