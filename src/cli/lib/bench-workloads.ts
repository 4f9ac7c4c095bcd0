import { coefficientDefaults, parseScenario, type Scenario } from '../../lib/thermal';
import { fitCoefficients, type CoefficientFitInput, type FittedCoefficient } from '../../lib/thermal/fit';
import { finishWork } from '../../lib/thermal/uncertainty/finish-work';
import { PRIORS, copyScenario, drawScenario } from '../../lib/thermal/uncertainty';
import { scrambledSobolPoint } from '../../lib/thermal/statistics';
import { OutcomeRunner } from '../../lib/thermal/vehicle/outcome-run';
import { inventTrace } from '../../../tests/support/invent-trace';
import { DAYS } from './bench-contenders';
import { findMedian } from './bench-table';

const WARM_UP = 3;
const REPEATS = 7;
const DAYS_A_YEAR = 365;

/** Some work on many days, and how often it is repeated for the median. */
export interface Workload {
	name: string;
	time: () => { ms: number; days: number };
}

function timeMedian(action: () => void): number {
	// What is measured is the steady state, not the way there.
	for (let k = 0; k < WARM_UP; k++) action();
	return findMedian(
		Array.from({ length: REPEATS }, () => {
			const start = performance.now();
			action();
			return performance.now() - start;
		})
	);
}

const day = (): Scenario => parseScenario(DAYS[1]!.input);

/** A year of days none of which is like another: warmer in summer, cloudy at times, a longer or shorter drive. */
function listYear(): Scenario[] {
	return Array.from({ length: DAYS_A_YEAR }, (_, at) => {
		const changed = copyScenario(day());
		const season = Math.cos((2 * Math.PI * at) / DAYS_A_YEAR);
		changed.climate.tMax = 26 + 10 * season + 4 * Math.sin(at * 2.4);
		changed.climate.sunPeak = 800 + 200 * season + 80 * Math.sin(at * 1.7);
		changed.legs[0]!.minutes = 120 + 60 * Math.sin(at * 0.9);
		return changed;
	});
}

function timeOutcomes(scenarios: readonly Scenario[]): { ms: number; days: number } {
	const runner = new OutcomeRunner();
	const ms = timeMedian(() => {
		for (const scenario of scenarios) runner.run(scenario);
	});
	return { ms, days: scenarios.length };
}

const lognormal = (group: FittedCoefficient['group'], key: string, middle: number): FittedCoefficient => ({
	...{ group, key },
	prior: { law: 'lognormal', middle, spread: 0.3 }
});

/** Three days of 24 hours, read each minute in three places, of which six coefficients are to be found. */
function inventFit(leaveOut: boolean): CoefficientFitInput {
	const coefficients = [
		lognormal('bay', 'leakClosed', 20),
		lognormal('bay', 'flowPerSpeed', 0.06),
		lognormal('exhaust', 'gasConductanceFull', 45),
		lognormal('engine', 'heatCapacity', 180e3),
		lognormal('battery', 'filmStill', 5),
		lognormal('battery', 'caseCellConductance', 2.5)
	];
	const traces = [36, 39, 42].map((tMax, seed) => {
		const scenario = { ...day(), climate: { ...day().climate, tMax } };
		const truth = copyScenario(scenario);
		truth.bay.leakClosed = 26;
		truth.battery.caseCellConductance = 3.1;
		const noise = { sdK: 0.3, keepsAMinute: 0.6 };
		const channels = ['bayAirC', 'caseC', 'cellC'] as const;
		return { trace: inventTrace({ scenario: truth, channels, noise, seed }), scenario };
	});
	return { traces, coefficients, book: coefficientDefaults(), options: { leaveOut } };
}

function timeFit(leaveOut: boolean): { ms: number; days: number } {
	const input = inventFit(leaveOut);
	const fit = finishWork(fitCoefficients(input));
	const ms = timeMedian(() => finishWork(fitCoefficients(input)));
	return { ms, days: fit.status === 'done' ? fit.runs : 0 };
}

export const WORKLOADS: readonly Workload[] = [
	{
		name: '1,000 sampled scenarios: drawn and run for peak, events and dark hours',
		time: () => {
			const scenario = day();
			const runner = new OutcomeRunner();
			const ms = timeMedian(() => {
				for (let draw = 0; draw < 1000; draw++) {
					runner.run(drawScenario(scenario, scrambledSobolPoint(draw, PRIORS.length, 1)));
				}
			});
			return { ms, days: 1000 };
		}
	},
	{
		name: 'a year of 365 different days',
		time: () => timeOutcomes(listYear())
	},
	{ name: 'six coefficients fitted to three days of 24 hours', time: () => timeFit(false) },
	{ name: '… and again without each day in turn', time: () => timeFit(true) }
];

/** The touring day again and again, as long as asked. */
function repeatDay(hours: number): Scenario {
	const scenario = day();
	const legs = [];
	let left = hours * 60;
	for (let at = 0; left > 0; at++) {
		const leg = scenario.legs[at % scenario.legs.length]!;
		legs.push({ ...leg, minutes: Math.min(leg.minutes, left) });
		left -= leg.minutes;
	}
	return { ...scenario, legs };
}

function usedBytes(): number {
	return process.memoryUsage().heapUsed;
}

/** Runs of growing length: what an hour costs, and what memory is asked for meanwhile. */
export const LONG_RUNS = {
	hours: [1, 10, 100, 1000],
	watch: (hours: number): { ms: number; bytes: number } => {
		const runner = new OutcomeRunner();
		const scenario = repeatDay(hours);
		const short = repeatDay(100);
		for (let k = 0; k < 20; k++) runner.run(short);
		const ms = timeMedian(() => runner.run(scenario));
		globalThis.gc?.();
		const before = usedBytes();
		runner.run(scenario);
		return { ms, bytes: usedBytes() - before };
	}
};
