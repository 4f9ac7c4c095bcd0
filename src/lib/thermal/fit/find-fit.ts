import { partOf } from '../uncertainty/finish-work';
import { firstNoise, judgeNoise, type ChannelNoise, type Noises } from './noise';
import { Search, type FitStatus } from './search';
import { LOSSES, type Loss } from './robust-loss';
import type { TraceProblem } from './trace-problem';

/** What the readings are taken to be good to before their residuals say it, K. */
const FIRST_SD_K = 0.5;
const MOST_ROUNDS = 6;
/** The noises count as settled when none moves by more than this share. */
const SETTLED = 0.03;

/** Parameters at which the traces fit best, with the noises that the residuals there have. */
export interface Found {
	parameters: number[];
	noises: Noises;
	status: FitStatus;
	rounds: number;
	settled: boolean;
	iterations: number;
}

export interface FindOptions {
	loss: Loss;
	leastSdK: number;
}

function isSettled(before: Noises, after: Noises): boolean {
	const worth = (noise: ChannelNoise | undefined) => Math.sqrt(noise?.informationPerK2 ?? 0);
	return Object.entries(after).every(([channel, noise]) => {
		const old = worth(before[channel as keyof Noises]);
		return Math.abs(worth(noise) - old) <= SETTLED * old;
	});
}

/**
 * Fits, judges from the residuals what the readings are worth, fits again, until the two agree.
 *
 * The first round takes all readings for independent and counts squares, so that the data are heard before they are doubted.
 *
 * @param start parameters to begin at
 * @param known noises of an earlier fit to much the same data; then the first round is left out
 * @returns as a generator, yields the share of the work done, as far as that can be told
 */
export function* findFit(
	problem: TraceProblem,
	{ loss, leastSdK }: FindOptions,
	start: readonly number[],
	known: Noises | null = null
): Generator<number, Found> {
	let noises = known ?? firstNoise(problem.blocks, FIRST_SD_K);
	let parameters = [...start];
	let iterations = 0;
	for (let round = 1; ; round++) {
		const counted = round === 1 && !known ? LOSSES.squares : loss;
		const search = new Search(problem.toLeastSquares(parameters, noises, counted));
		const status = yield* partOf(
			search.run(),
			() => (round - 1 / (1 + search.iterations)) / (MOST_ROUNDS + 1)
		);
		parameters = search.parameters;
		iterations += search.iterations;
		const judged = judgeNoise(problem.blocks, problem.residuals(parameters), loss, leastSdK);
		const settled = isSettled(noises, judged);
		if (settled || round === MOST_ROUNDS || status !== 'converged') {
			return { parameters, noises: judged, status, rounds: round, settled, iterations };
		}
		noises = judged;
	}
}
