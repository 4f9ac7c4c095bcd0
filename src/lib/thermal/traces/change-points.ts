import { EngineInputError, requirePositive } from '../correlations/require';

/** One series on an even grid, every value finite. */
export interface ChangeSignal {
	values: ArrayLike<number>;
	/** Between two changes the signal keeps its level, or it follows a line. */
	shape: 'level' | 'line';
	/** Standard deviation of what is no change, in the unit of the values. */
	noise: number;
}

type Cost = (from: number, to: number) => number;

/** Running sums of a function of the place: `sums[k]` over the first k. */
function sumUp(count: number, valueAt: (at: number) => number): Float64Array {
	const sums = new Float64Array(count + 1);
	for (let at = 0; at < count; at++) sums[at + 1] = sums[at]! + valueAt(at);
	return sums;
}

/** Sum of squares about the best level, or the best line, of a stretch, in squares of the noise. */
function makeCost({ values, shape, noise }: ChangeSignal): Cost {
	const count = values.length;
	let mean = 0;
	for (let at = 0; at < count; at++) mean += values[at]! / count;
	// About their mean, and in the noise: sums of squares then keep their digits.
	const y = (at: number) => (values[at]! - mean) / noise;
	const ofY = sumUp(count, y);
	const ofYY = sumUp(count, (at) => y(at) * y(at));
	const aboutLevel: Cost = (from, to) => {
		const sum = ofY[to]! - ofY[from]!;
		return Math.max(ofYY[to]! - ofYY[from]! - (sum * sum) / (to - from), 0);
	};
	if (shape === 'level') return aboutLevel;
	const ofTY = sumUp(count, (at) => at * y(at));
	return (from, to) => {
		const n = to - from;
		if (n <= 2) return 0;
		const middle = (from + to - 1) / 2;
		const slopeSum = ofTY[to]! - ofTY[from]! - middle * (ofY[to]! - ofY[from]!);
		return Math.max(aboutLevel(from, to) - (slopeSum * slopeSum) / ((n * (n * n - 1)) / 12), 0);
	};
}

function requireSignals(signals: readonly ChangeSignal[]): number {
	const count = signals[0]?.values.length ?? 0;
	if (count === 0) throw new EngineInputError('signals', count, 'at least one series with values');
	for (const { values, noise } of signals) {
		requirePositive({ noise });
		if (values.length !== count)
			throw new EngineInputError('values.length', values.length, `${count} in each`);
	}
	return count;
}

/**
 * Where the character of one or more series changes, all of them at the same places: the exact best cut by PELT.
 *
 *     min over cuts of Σ [ C(stretch) + β ],   C = Σ over signals of Σ (y − ŷ)²/σ²
 *
 * @param signals series of one length; ŷ is the mean of the stretch, or its line of least squares
 * @param penalty β, what each further stretch must save; dimensionless
 * @returns the first place of each stretch but the first, rising; none where nothing changes
 * @throws EngineInputError for no values, series of several lengths, or a noise or penalty not above zero
 * Validity: noise about even and independent; up to some thousand values: where nothing ever changes the work grows with their square.
 * Source: Killick, Fearnhead and Eckley, Optimal detection of changepoints with a linear computational cost, Journal of the
 * American Statistical Association 107 (2012) 1590, with K = 0; from memory.
 * @example
 * findChangePoints([{ values: [0, 0, 0, 9, 9, 9, 9], shape: 'level', noise: 1 }], 10); // [3]
 */
export function findChangePoints(signals: readonly ChangeSignal[], penalty: number): number[] {
	requirePositive({ penalty });
	const count = requireSignals(signals);
	const costs = signals.map(makeCost);
	const costOf: Cost = (from, to) => {
		let sum = 0;
		for (const cost of costs) sum += cost(from, to);
		return sum;
	};
	const best = new Float64Array(count + 1);
	const lastCut = new Int32Array(count + 1);
	best[0] = -penalty;
	let candidates = [0];
	for (let to = 1; to <= count; to++) {
		best[to] = Infinity;
		const without = candidates.map((from) => best[from]! + costOf(from, to));
		without.forEach((value, at) => {
			if (value + penalty >= best[to]!) return;
			best[to] = value + penalty;
			lastCut[to] = candidates[at]!;
		});
		// A cut that is worse by now than a fresh one can be made here will never be the best again.
		candidates = candidates.filter((_, at) => without[at]! <= best[to]!);
		candidates.push(to);
	}
	return followBack(lastCut, count);
}

function followBack(lastCut: Int32Array, count: number): number[] {
	const cuts: number[] = [];
	for (let at = lastCut[count]!; at > 0; at = lastCut[at]!) cuts.push(at);
	return cuts.reverse();
}
