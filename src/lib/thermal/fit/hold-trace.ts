import { holdMeasured, READING_PLACES, type Held, type ReadingPlace } from '../field';
import { sampleQuantile, scrambledSobolPoint, standardDeviation } from '../statistics';
import { drawScenario } from '../uncertainty/draw-scenario';
import { PRIORS, type Prior } from '../uncertainty/priors';
import { listBlocks, markLegs, type Block } from './blocks';
import type { TraceToFit } from './fit-setup';
import { requireStart } from './start-temps';
import { CHANNEL_NODES, isMeasured, requireTrace, type FitTrace } from './trace';
import { TraceModel, type TraceOfScenario } from './trace-model';

const EDGE = 0.05;
/** With fewer draws run to their ends the rest would be a choice among them. */
const LEAST_SHARE_RUN = 0.9;
/** What a logger's thermometer is right to, K; engineering judgement. */
const SENSOR_SD_K = 0.5;
/** The nearer to the cells, the more a measurement says of what was predicted of them. */
const NEAREST_FIRST: readonly ReadingPlace[] = ['cells', 'board', 'case'];

/** A whole trace held against what had been predicted of its day, °C and K. */
export interface HeldTrace extends Held {
	/** Where it was measured: the measured place nearest to the cells. */
	place: ReadingPlace;
	/** Mean of the squared errors of its readings, K². */
	meanSquare: number;
	/** How far off it is in stated standard deviations: its mean, or its single readings where these are further off. */
	misfit: number;
}

/** The legs are those that were driven. */
const NEVER_DRAWN = ['driveLength'];
/** What is known once the outside air, or the current, was measured. */
const KNOWN_BY = { ambientC: ['dayMax', 'dayRange'], currentA: ['loads'] } as const;

function listUnknowns({ channels }: FitTrace): Prior[] {
	const known = (['ambientC', 'currentA'] as const).flatMap((channel) =>
		isMeasured(channels[channel]) ? [...KNOWN_BY[channel]] : []
	);
	return PRIORS.filter(({ key }) => ![...NEVER_DRAWN, ...known].includes(key));
}

/** The readings that the prediction is held against; undefined where nothing of the battery was measured. */
function nearestBlock(of: TraceOfScenario): Block | undefined {
	const within = markLegs(of, [...of.scenario.legs.keys()]);
	const blocks = listBlocks(of, 0, within);
	return NEAREST_FIRST.flatMap((place) =>
		blocks.filter(({ channel }) => CHANNEL_NODES[channel] === place)
	).at(0);
}

/** What is foretold at the readings of a block, from the first readings on, leg by leg. */
function* foretell(of: TraceOfScenario, { row, at }: Block): Generator<void, Float64Array> {
	const model = new TraceModel(of, []);
	const rows = yield* model.predictByLegs(
		[],
		model.starts.map(({ mean }) => mean)
	);
	return Float64Array.from(at, (place) => rows[row]![place]!);
}

/** The same work, yielding how far the whole is of which it is a part. */
function* asPartOf<Result>(work: Generator<void, Result>, share: number): Generator<number, Result> {
	for (let step = work.next(); ; step = work.next()) {
		if (step.done) return step.value;
		yield share;
	}
}

const meanOf = (values: Float64Array): number =>
	values.reduce((sum, value) => sum + value, 0) / values.length;

/**
 * A trace against what had been predicted of its day: the mean over the day, with the band that the unknowns make.
 *
 *     error = mean(measured − predicted);  σ² = σ_draws² + 0.5²
 *     band: predicted ∓ √(edge² + (1.6449 · 0.5)²), edges the quantiles 0.05 and 0.95 of the mean over draws
 *
 * The day is run with the legs of the scenario, on the air and current that were measured, from the first readings on; what was
 * measured is not drawn. misfit = max(|error|, √mean((measured − predicted)²)) / σ: a mean may be right by chance.
 *
 * @param of trace and the scenario that its mount had been assessed with, its legs those that were driven
 * @param options number of draws (a power of two keeps them even) and seed
 * @returns as a generator, yields the share of the work done after each leg, and returns the trace held against it; null where no temperature
 *   of the battery was measured, or the day or more than a tenth of its draws cannot be run to their ends
 * @throws EngineInputError with the path for a trace that cannot be
 * Validity: the priors of PRIORS, independent of one another; legs as they were driven; sensors right to ± 0.5 K (judgement).
 * Source: sum of independent variances; Owen, Randomly permuted (t,m,s)-nets (1995) for the points.
 * @example
 * const scenario = defaultScenario([{ minutes: 60, engineOn: true, speedKmh: 60 }]);
 * const caseC = runScenario(scenario).minutes.nodes.case;
 * const timeS = Float64Array.from(caseC.keys(), (minute) => 60 * minute);
 * const trace = { startedAtHour: 6, timeS, channels: { caseC: caseC.map((value) => value + 2) } };
 * const work = holdTrace({ trace, scenario }, { samples: 8, seed: 1 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.place; // 'case'
 */
export function* holdTrace(
	{ trace, scenario, start = { kind: 'air' } }: TraceToFit,
	{ samples, seed }: { samples: number; seed: number }
): Generator<number, HeldTrace | null> {
	requireTrace(trace, 'trace');
	requireStart(start, 'start');
	const of = { trace, scenario, start };
	const block = nearestBlock(of);
	if (!block) return null;
	const measured = Float64Array.from(block.at, (place) => block.measured[place]!);
	const foretold = yield* asPartOf(foretell(of, block), 0);
	if (foretold.some(Number.isNaN)) return null;
	const unknowns = listUnknowns(trace);
	const means: number[] = [];
	for (let draw = 0; draw < samples; draw++) {
		const drawn = drawScenario(scenario, scrambledSobolPoint(draw, unknowns.length, seed), unknowns);
		const running = foretell({ ...of, scenario: drawn }, block);
		const mean = meanOf(yield* asPartOf(running, draw / samples));
		if (!Number.isNaN(mean)) means.push(mean);
		yield (draw + 1) / samples;
	}
	if (means.length < LEAST_SHARE_RUN * samples || means.length < 2) return null;
	const middleC = meanOf(foretold);
	const spread = {
		lowC: Math.min(sampleQuantile(means, EDGE), middleC),
		middleC,
		highC: Math.max(sampleQuantile(means, 1 - EDGE), middleC),
		sdK: standardDeviation(means)
	};
	const held = holdMeasured(meanOf(measured), spread, SENSOR_SD_K);
	const meanSquare = meanOf(measured.map((value, at) => (value - foretold[at]!) ** 2));
	const misfit = Math.max(Math.abs(held.error!), Math.sqrt(meanSquare)) / Math.hypot(spread.sdK, SENSOR_SD_K);
	const place = READING_PLACES.find((each) => each === CHANNEL_NODES[block.channel])!;
	return { ...held, place, meanSquare, misfit };
}
