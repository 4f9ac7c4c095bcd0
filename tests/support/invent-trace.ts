import { ambientTempC, runScenario, type Scenario } from '../../src/lib/thermal';
import type { FitChannel, FitTrace } from '../../src/lib/thermal/fit';
import { CHANNEL_NODES } from '../../src/lib/thermal/fit';
import { hashWords, normalQuantile } from '../../src/lib/thermal/statistics';

const MINUTE_S = 60;
/** How the air strays from the day's curve, from one minute to the next and at all. */
const WOBBLE = { keeps: 0.98, sdK: 0.8 };
const AIR_STREAM = 97;
const AIR_NOISE_STREAM = 98;

/** What is invented: a day as it truly is, and what a logger makes of it. */
export interface Invention {
	/** With the true coefficients. */
	scenario: Scenario;
	channels: readonly FitChannel[];
	/** Standard deviation of what a reading is off by, K, and how much of it is left a minute later, 0…1. */
	noise: { sdK: number; keepsAMinute: number };
	seed: number;
	/** Length of time that a reading is the mean of, in whole minutes. */
	everyMin?: number;
	/** Whether the battery's current is read, too, without error. */
	withCurrent?: boolean;
}

/** Numbers as of a normal distribution, always the same for a seed. */
export function normalNumber(...address: readonly number[]): number {
	return normalQuantile((hashWords(...address) + 0.5) / 2 ** 32);
}

/** Numbers with standard deviation 1 of which each keeps a share of the one before: an autoregression of first order. */
function inventDrift(count: number, keeps: number, ...address: readonly number[]): Float64Array {
	const drift = new Float64Array(count);
	for (let at = 0; at < count; at++) {
		const fresh = normalNumber(...address, at);
		drift[at] = at === 0 ? fresh : keeps * drift[at - 1]! + Math.sqrt(1 - keeps * keeps) * fresh;
	}
	return drift;
}

function inventAir({ climate, start, legs }: Scenario, seed: number): Float64Array {
	const count = legs.reduce((sum, { minutes }) => sum + minutes, 0) + 1;
	const wobble = inventDrift(count, WOBBLE.keeps, seed, AIR_STREAM);
	return wobble.map((off, at) => ambientTempC(start.hour + at / MINUTE_S, climate) + WOBBLE.sdK * off);
}

/** Means over equal times of a curve on the grid of minutes, straight in between. */
function meansOf(curve: Float64Array, everyMin: number): Float64Array {
	const count = Math.floor((curve.length - 1) / everyMin);
	return Float64Array.from({ length: count }, (_, at) => {
		let sum = 0;
		for (let k = at * everyMin; k < (at + 1) * everyMin; k++) sum += (curve[k]! + curve[k + 1]!) / 2;
		return sum / everyMin;
	});
}

/**
 * A trace of a day that never was: the model run on air that strays from the day's curve, and readings that are off by what hangs
 * together a little from one to the next.
 */
export function inventTrace({
	scenario,
	channels,
	noise,
	seed,
	everyMin = 1,
	withCurrent = false
}: Invention): FitTrace {
	const valuesC = inventAir(scenario, seed);
	const run = runScenario({ ...scenario, measured: { air: { everyS: MINUTE_S, valuesC } } });
	if (run.status === 'failed') throw new Error(run.reason);
	const keeps = noise.keepsAMinute ** everyMin;
	const read = (curve: Float64Array, sdK: number, stream: number) => {
		const means = meansOf(curve, everyMin);
		const off = inventDrift(means.length, keeps, seed, stream);
		return means.map((mean, at) => mean + sdK * off[at]!);
	};
	const temperatures = channels.map((channel, stream) => [
		channel,
		read(run.minutes.nodes[CHANNEL_NODES[channel]], noise.sdK, stream)
	]);
	const current = withCurrent ? { currentA: meansOf(run.minutes.currentA, everyMin) } : {};
	const ambientC = read(valuesC, noise.sdK, AIR_NOISE_STREAM);
	return {
		startedAtHour: scenario.start.hour,
		timeS: Float64Array.from(ambientC, (_, at) => (at + 0.5) * everyMin * MINUTE_S),
		channels: { ambientC, ...current, ...(Object.fromEntries(temperatures) as FitTrace['channels']) }
	};
}

/** The file that a logger would have written of it: tenths, empty where nothing was logged. */
export function writeTraceCsv({ timeS, channels }: FitTrace): string {
	const columns = Object.entries(channels);
	const cell = (value: number) => (Number.isNaN(value) ? '' : value.toFixed(1));
	const rows = [...timeS].map((time, at) => [time, ...columns.map(([, values]) => cell(values[at]!))].join());
	return [['timeS', ...columns.map(([name]) => name)].join(), ...rows].join('\n') + '\n';
}
