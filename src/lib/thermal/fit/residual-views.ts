import type { Block } from './blocks';
import type { FitChannel } from './trace';

/** As many points of a residual's curve as can be drawn. */
const MOST_POINTS = 300;
const TEMPERATURE_BINS = 12;

/** Model less reading over a trace, as means over equal times; null where nothing was measured. */
export interface ResidualCurve {
	trace: number;
	channel: FitChannel;
	/** Middle of each mean, s. */
	timeS: number[];
	beforeK: (number | null)[];
	afterK: (number | null)[];
}

/** Model less reading where the reading lay within a range of temperatures. */
export interface TemperatureBin {
	channel: FitChannel;
	fromC: number;
	toC: number;
	readings: number;
	beforeK: number;
	afterK: number;
	/** Standard deviation of the residuals after the fit within the bin, K. */
	sdK: number;
}

function meanOf(values: Float64Array, from: number, to: number): number | null {
	let sum = 0;
	let count = 0;
	for (let at = from; at < Math.min(to, values.length); at++) {
		if (Number.isNaN(values[at]!)) continue;
		sum += values[at]!;
		count++;
	}
	return count > 0 ? sum / count : null;
}

/** Residuals over time, thinned to what can be drawn. */
export function drawResiduals(
	blocks: readonly Block[],
	timesS: readonly Float64Array[],
	before: readonly Float64Array[],
	after: readonly Float64Array[]
): ResidualCurve[] {
	return blocks.map(({ trace, channel }, block) => {
		const timeS = timesS[trace]!;
		const width = Math.ceil(timeS.length / MOST_POINTS);
		const starts = Array.from({ length: Math.ceil(timeS.length / width) }, (_, point) => point * width);
		const means = (values: Float64Array) => starts.map((from) => meanOf(values, from, from + width));
		return {
			trace,
			channel,
			timeS: starts.map((from) => meanOf(timeS, from, from + width)!),
			beforeK: means(before[block]!),
			afterK: means(after[block]!)
		};
	});
}

interface Reading {
	tempC: number;
	before: number;
	after: number;
}

function summarise(
	channel: FitChannel,
	fromC: number,
	toC: number,
	readings: readonly Reading[]
): TemperatureBin {
	const mean = (of: (reading: Reading) => number) =>
		readings.reduce((sum, reading) => sum + of(reading), 0) / readings.length;
	const afterK = mean(({ after }) => after);
	return {
		...{ channel, fromC, toC, afterK },
		readings: readings.length,
		beforeK: mean(({ before }) => before),
		sdK: Math.sqrt(mean(({ after }) => (after - afterK) ** 2))
	};
}

/** Residuals by what was measured, channel by channel, in equal ranges of temperature; empty ones are left out. */
export function sortByTemperature(
	blocks: readonly Block[],
	before: readonly Float64Array[],
	after: readonly Float64Array[]
): TemperatureBin[] {
	const channels = [...new Set(blocks.map(({ channel }) => channel))];
	return channels.flatMap((channel) => {
		const readings = blocks.flatMap((block, at) =>
			block.channel === channel
				? [...block.at].map((place): Reading => ({
						tempC: block.measured[place]!,
						before: before[at]![place]!,
						after: after[at]![place]!
					}))
				: []
		);
		const [low, high] = readings.reduce(
			([least, most], { tempC }) => [Math.min(least, tempC), Math.max(most, tempC)] as const,
			[Infinity, -Infinity] as readonly [number, number]
		);
		const width = Math.max(high - low, 1) / TEMPERATURE_BINS;
		const bins: Reading[][] = Array.from({ length: TEMPERATURE_BINS }, () => []);
		for (const reading of readings) {
			bins[Math.min(Math.floor((reading.tempC - low) / width), TEMPERATURE_BINS - 1)]!.push(reading);
		}
		return bins.flatMap((bin, at) =>
			bin.length > 0 ? [summarise(channel, low + at * width, low + (at + 1) * width, bin)] : []
		);
	});
}
