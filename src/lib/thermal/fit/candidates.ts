import type { Leg } from '../types';
import { partOf } from '../uncertainty/finish-work';
import { informationOf, withPriorInformation, type Asked } from './information';
import type { FitSetup } from './fit-setup';
import type { ChannelNoise, Noises } from './noise';
import { CHANNEL_LABELS, FIT_CHANNELS, type FitChannel } from './trace';
import { TraceModel, type TraceOfScenario } from './trace-model';
import { TraceProblem, type Sensitivities } from './trace-problem';
import type { Posterior } from './estimates';
import { addMatrices, invertPositive } from './small-matrices';

/** Something that could be measured in addition, and what it would make of the intervals. */
export interface Candidate {
	kind: 'channel' | 'leg';
	key: string;
	/** As it is said to people. */
	label: string;
	/** Width of each coefficient's interval then over that of now, in the order of the coefficients. */
	widthLeft: number[];
	/** Their mean: the smaller, the more it tells. */
	meanLeft: number;
}

type CandidateLegs = readonly (Pick<Leg, 'minutes'> & Partial<Leg>)[];

/** Kinds of leg that tell of one part of the model or another, each with what goes before it. */
const CANDIDATE_LEGS: readonly { key: string; label: string; legs: CandidateLegs }[] = [
	{
		key: 'highway',
		label: 'two hours on the highway',
		legs: [{ minutes: 120, engineOn: true, speedKmh: 100 }]
	},
	{
		key: 'climb',
		label: 'an hour of slow climbing',
		legs: [
			{ minutes: 20, engineOn: true, speedKmh: 60 },
			{ minutes: 60, engineOn: true, speedKmh: 30, gradePercent: 7 }
		]
	},
	{ key: 'idle', label: 'an hour of idling', legs: [{ minutes: 60, engineOn: true }] },
	{
		key: 'soak',
		label: 'three hours of standing, bonnet shut, after a drive',
		legs: [{ minutes: 60, engineOn: true, speedKmh: 80 }, { minutes: 180 }]
	},
	{
		key: 'open',
		label: 'three hours of standing, bonnet open, after a drive',
		legs: [
			{ minutes: 60, engineOn: true, speedKmh: 80 },
			{ minutes: 180, bonnetOpen: true }
		]
	}
];
const CANDIDATE_HOUR = 10;
const MINUTE_S = 60;

function weighCandidate(
	{ covarianceOnAir, dataInformation }: Posterior,
	more: readonly (readonly number[])[],
	count: number
): Pick<Candidate, 'widthLeft' | 'meanLeft'> {
	const then = invertPositive(withPriorInformation(addMatrices(dataInformation, more)));
	const widthLeft = Array.from({ length: count }, (_, at) =>
		Math.sqrt(then[at]![at]! / covarianceOnAir[at]![at]!)
	);
	return { widthLeft, meanLeft: widthLeft.reduce((sum, left) => sum + left, 0) / count };
}

/** What a channel of which nothing is known is taken to be worth: as much as the least telling of those that were measured. */
function leastTelling(noises: Noises): ChannelNoise {
	return Object.values(noises).reduce((least, noise) =>
		noise.informationPerK2 < least.informationPerK2 ? noise : least
	);
}

/** Channels that were measured in no trace, each as if it had been measured in all. */
function weighChannels(
	setup: FitSetup,
	sensitivities: Sensitivities,
	noises: Noises,
	posterior: Posterior
): Candidate[] {
	const measured = new Set(setup.blocksOf(setup.all, 'fitted').map(({ channel }) => channel));
	const guess = leastTelling(noises);
	return FIT_CHANNELS.filter((channel) => !measured.has(channel)).flatMap((channel): Candidate[] => {
		const asked = setup.all.flatMap((trace) => setup.wouldRead(trace, channel));
		if (asked.length === 0) return [];
		const more = informationOf(asked, sensitivities, { [channel]: guess });
		const weighed = weighCandidate(posterior, more, setup.coefficients.length);
		return [
			{ kind: 'channel', key: channel, label: `a thermometer: ${CHANNEL_LABELS[channel]}`, ...weighed }
		];
	});
}

/** The first trace's vehicle and mount on another day, of which the same would be measured. */
function dayOf({ scenario }: TraceOfScenario, legs: CandidateLegs): TraceOfScenario {
	const minutes = legs.reduce((sum, leg) => sum + leg.minutes, 0);
	const still: Leg = {
		...{ minutes: 0, engineOn: false, speedKmh: 0, surface: 'sealed', gradePercent: 0 },
		...{ towMassKg: 0, towDragAreaM2: 0, bonnetOpen: false, loadA: scenario.legs[0]!.loadA }
	};
	return {
		scenario: { ...scenario, legs: legs.map((leg) => ({ ...still, ...leg })) },
		trace: {
			startedAtHour: CANDIDATE_HOUR,
			timeS: Float64Array.from({ length: minutes }, (_, at) => (at + 0.5) * MINUTE_S),
			channels: {}
		},
		start: { kind: 'air' }
	};
}

/** Which of its rows a model has for the channels that are measured. */
function askOf(model: TraceModel, of: TraceOfScenario, channels: ReadonlySet<FitChannel>): Asked[] {
	const at = Int32Array.from(of.trace.timeS.keys());
	return FIT_CHANNELS.filter((channel) => model.foretells(channel)).flatMap((channel, row) =>
		channels.has(channel) ? [{ trace: 0, channel, row, at }] : []
	);
}

/**
 * What each further channel or kind of leg would make of the intervals, the most telling first. The error of the air is left aside.
 *
 *     C′ = (I + I′ + 1)⁻¹,   I′ from the derivatives of what the model foretells for it
 *
 * Source: Atkinson and Donev, Optimum Experimental Designs (1992), chapter 10 (criterion A, by the parameters' own spreads).
 *
 * @returns as a generator, yields the share of the work done
 */
export function* weighCandidates(
	setup: FitSetup,
	parameters: readonly number[],
	sensitivities: Sensitivities,
	noises: Noises,
	posterior: Posterior
): Generator<number, Candidate[]> {
	const found = weighChannels(setup, sensitivities, noises, posterior);
	const count = setup.coefficients.length;
	const measured = new Set(Object.keys(noises) as FitChannel[]);
	for (const [at, { key, label, legs }] of CANDIDATE_LEGS.entries()) {
		const day = dayOf(setup.traceAt(0), legs);
		const model = new TraceModel(day, setup.coefficients);
		const problem = new TraceProblem([model], setup.coefficients, []);
		const felt = yield* partOf(
			problem.findSensitivities(parameters.slice(0, count)),
			() => at / CANDIDATE_LEGS.length
		);
		const more = informationOf(askOf(model, day, measured), felt, noises);
		found.push({ kind: 'leg', key, label, ...weighCandidate(posterior, more, count) });
	}
	return found.sort((a, b) => a.meanLeft - b.meanLeft);
}
