// Writes the traces and their truth beside itself: npx tsx reference-data/synthetic-traces/make.ts
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { parseScenario, type ScenarioInput } from '../../src/lib/thermal';
import type { FitChannel, FitTrace } from '../../src/lib/thermal/fit';
import { inventTrace, writeTraceCsv } from '../../tests/support/invent-trace';

const SEED = 20261202;
const CHANNELS: readonly FitChannel[] = ['bayAirC', 'exhaustShieldC', 'caseC', 'cellC'];
const NOISE = { sdK: 0.3, keepsAMinute: 0.6 };

/** What is true in all three traces; everything else is as in the days. */
const COEFFICIENTS: Record<string, Record<string, number>> = {
	bay: { leakClosed: 27, share: 0.5 },
	exhaust: { gasConductanceFull: 55 },
	engine: { heatCapacity: 210e3 },
	position: { bayAirFraction: 0.75 },
	battery: { caseCellConductance: 3.2 }
};

/** The mount and the days as everybody knows them, with the legs that were driven. */
const DAYS: readonly ScenarioInput[] = [
	{
		...{ shield: {}, position: { exhaustView: 0.02 }, climate: { tMax: 38 }, start: { hour: 6, soc: 0.6 } },
		legs: [
			{ minutes: 150 },
			{ minutes: 180, engineOn: true, speedKmh: 90, loadA: 4 },
			{ minutes: 45, loadA: 6 },
			{ minutes: 150, engineOn: true, speedKmh: 45, surface: 'gravel', gradePercent: 2, loadA: 4 },
			{ minutes: 915, loadA: 5 }
		]
	},
	{
		...{ shield: {}, position: { exhaustView: 0.02 }, climate: { tMax: 33 }, start: { hour: 8, soc: 0.7 } },
		legs: [
			{ minutes: 60, engineOn: true, speedKmh: 30 },
			{ minutes: 120 },
			{ minutes: 240, engineOn: true, speedKmh: 100, loadA: 4 },
			{ minutes: 1020, loadA: 3 }
		]
	},
	{
		...{ shield: {}, position: { exhaustView: 0.02 }, climate: { tMax: 42 }, start: { hour: 5, soc: 0.4 } },
		legs: [
			{ minutes: 120 },
			{ minutes: 300, engineOn: true, speedKmh: 70, loadA: 4 },
			{ minutes: 30, engineOn: true },
			{ minutes: 90, bonnetOpen: true },
			{ minutes: 900, loadA: 5 }
		]
	}
];

/** A loose plug: for some minutes a channel shows nonsense. */
const GLITCH = { trace: 0, channel: 'cellC', fromMinute: 400, minutes: 4, readsC: 95 } as const;
/** The logger was without supply. */
const GAP = { trace: 1, fromMinute: 500, minutes: 50 };

function addTrue(day: ScenarioInput): ScenarioInput {
	const groups = Object.entries(COEFFICIENTS).map(([group, values]) => [
		group,
		{ ...(day[group as keyof ScenarioInput] as Record<string, number> | undefined), ...values }
	]);
	return { ...day, ...(Object.fromEntries(groups) as Partial<ScenarioInput>) };
}

function spoil(trace: FitTrace, at: number): FitTrace {
	const { channels } = trace;
	if (at === GLITCH.trace) {
		channels[GLITCH.channel]!.fill(GLITCH.readsC, GLITCH.fromMinute, GLITCH.fromMinute + GLITCH.minutes);
	}
	if (at === GAP.trace) {
		for (const values of Object.values(channels))
			values.fill(NaN, GAP.fromMinute, GAP.fromMinute + GAP.minutes);
	}
	return trace;
}

/** What each file holds, by its name. */
export function makeFiles(): Record<string, string> {
	const traces = DAYS.map((day, at) => {
		const scenario = parseScenario(addTrue(day));
		const invention = { scenario, channels: CHANNELS, noise: NOISE, seed: SEED + at, withCurrent: true };
		return [`trace-${at + 1}.csv`, writeTraceCsv(spoil(inventTrace(invention), at))];
	});
	const truth = {
		synthetic: true,
		...{ seed: SEED, noise: NOISE, coefficients: COEFFICIENTS, days: DAYS, glitch: GLITCH, gap: GAP }
	};
	return { ...Object.fromEntries(traces), 'truth.json': JSON.stringify(truth, null, '\t') + '\n' };
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
	for (const [name, text] of Object.entries(makeFiles())) {
		writeFileSync(new URL(name, import.meta.url), text);
	}
}
