/** With fewer draws left that agree, nothing is said by them: engineering judgement. */
export const FEWEST_EFFECTIVE = 6;

/** What is left of a number of equal draws once they are weighed: so many equal ones would say as much. */
export function effectiveCount(weights: readonly number[]): number {
	let sum = 0;
	let squares = 0;
	for (const weight of weights) {
		sum += weight;
		squares += weight * weight;
	}
	return squares === 0 ? 0 : (sum * sum) / squares;
}

export function weightedMean(values: readonly number[], weights: readonly number[]): number {
	let sum = 0;
	let all = 0;
	values.forEach((value, at) => {
		sum += value * weights[at]!;
		all += weights[at]!;
	});
	return sum / all;
}

/** The value that a share of the weight stays at or below. */
export function weightedQuantile(
	values: readonly number[],
	weights: readonly number[],
	share: number
): number {
	const order = values.map((_, at) => at).sort((a, b) => values[a]! - values[b]!);
	const all = weights.reduce((sum, weight) => sum + weight, 0);
	let passed = 0;
	for (const at of order) {
		passed += weights[at]!;
		if (passed >= share * all) return values[at]!;
	}
	return values[order.at(-1)!]!;
}

/**
 * Draws again, each as often as its weight says, evenly spaced: the same weights give the same draws.
 *
 *     index of the (k + ½)/n part of the summed weights
 */
export function drawAgain(weights: readonly number[], count: number): number[] {
	const all = weights.reduce((sum, weight) => sum + weight, 0);
	const drawn: number[] = [];
	let passed = weights[0]!;
	let at = 0;
	for (let k = 0; k < count; k++) {
		const mark = ((k + 0.5) / count) * all;
		while (passed < mark && at + 1 < weights.length) passed += weights[++at]!;
		drawn.push(at);
	}
	return drawn;
}
