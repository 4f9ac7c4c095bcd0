import { EngineInputError } from '../correlations/require';
import type { NodeName } from '../types';

/** The node that each measured temperature is held against. */
export const CHANNEL_NODES = {
	bayAirC: 'bay',
	exhaustShieldC: 'shield',
	caseC: 'case',
	cellC: 'cells',
	boardC: 'board'
} as const satisfies Record<string, NodeName>;
export type FitChannel = keyof typeof CHANNEL_NODES;
export const FIT_CHANNELS = Object.keys(CHANNEL_NODES) as FitChannel[];

/** As they are said to people. */
export const CHANNEL_LABELS: Readonly<Record<FitChannel, string>> = {
	bayAirC: 'air in the bay',
	exhaustShieldC: 'heat shield',
	caseC: 'battery case',
	cellC: 'cells',
	boardC: 'board'
};

/** What drives the model instead of being held against it. */
const DRIVING_CHANNELS = ['ambientC', 'currentA', 'speedKmh'] as const;
export type TraceChannelName = FitChannel | (typeof DRIVING_CHANNELS)[number];
const CHANNEL_NAMES: readonly string[] = [...FIT_CHANNELS, ...DRIVING_CHANNELS];

/** What a logger measured, as means over equal times. */
export interface FitTrace {
	/** Clock hour from which the times count, local solar time, 0…24. */
	startedAtHour: number;
	/** Middle of each mean, s from the start; evenly spaced. */
	timeS: Float64Array;
	/** °C, A (positive charging) and km/h, as long as `timeS`; NaN where nothing was measured. */
	channels: Partial<Record<TraceChannelName, Float64Array>>;
}

const FEWEST_READINGS = 10;
/** Times may stray by this share of their spacing. */
const UNEVEN = 0.01;

function requireTimes(timeS: Float64Array, path: string): void {
	if (timeS.length < FEWEST_READINGS) {
		throw new EngineInputError(`${path}.length`, timeS.length, `at least ${FEWEST_READINGS}`);
	}
	const [first, last] = [timeS[0]!, timeS.at(-1)!];
	const apartS = (last - first) / (timeS.length - 1);
	timeS.forEach((time, at) => {
		const evenS = first + at * apartS;
		if (!(time >= 0)) throw new EngineInputError(`${path}[${at}]`, time, 'a time not before the start');
		if (!(apartS > 0 && Math.abs(time - evenS) <= UNEVEN * apartS)) {
			throw new EngineInputError(`${path}[${at}]`, time, 'evenly spaced with the others');
		}
	});
}

function requireValues(values: Float64Array, count: number, path: string): void {
	if (values.length !== count) {
		throw new EngineInputError(`${path}.length`, values.length, `${count}, one for each time`);
	}
	const at = values.findIndex((value) => Math.abs(value) === Infinity);
	if (at >= 0)
		throw new EngineInputError(`${path}[${at}]`, values[at]!, 'a finite number, or NaN where missing');
}

export const isMeasured = (values: Float64Array | undefined): values is Float64Array =>
	values !== undefined && values.some((value) => !Number.isNaN(value));

/** Refuses a trace that no model could be held against; `path` says where it stands. */
export function requireTrace({ startedAtHour, timeS, channels }: FitTrace, path: string): void {
	if (!(startedAtHour >= 0 && startedAtHour <= 24)) {
		throw new EngineInputError(`${path}.startedAtHour`, startedAtHour, 'within 0 to 24');
	}
	requireTimes(timeS, `${path}.timeS`);
	for (const [name, values] of Object.entries(channels)) {
		const at = `${path}.channels.${name}`;
		if (!CHANNEL_NAMES.includes(name)) {
			throw new EngineInputError(at, NaN, `left out: the known ones are ${CHANNEL_NAMES.join(', ')}`);
		}
		requireValues(values, timeS.length, at);
	}
	const readings = FIT_CHANNELS.reduce(
		(sum, name) => sum + (channels[name] ?? []).filter((value) => !Number.isNaN(value)).length,
		0
	);
	if (readings < FEWEST_READINGS) {
		throw new EngineInputError(
			`${path}.channels`,
			readings,
			`at least ${FEWEST_READINGS} readings of ${FIT_CHANNELS.join(', ')}`
		);
	}
}
