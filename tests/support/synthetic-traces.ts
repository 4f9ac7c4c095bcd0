import { readFileSync } from 'node:fs';
import { parseScenario } from '../../src/lib/thermal';
import type { FitTrace, FittedCoefficient, TraceToFit } from '../../src/lib/thermal/fit';

const root = new URL('../../reference-data/synthetic-traces/', import.meta.url);

export interface SyntheticTruth {
	coefficients: Record<string, Record<string, number>>;
	days: { start: { hour: number } }[];
	glitch: { trace: number; fromMinute: number; minutes: number };
}

export function readSynthetic(name: string): string {
	return readFileSync(new URL(name, root), 'utf8');
}

export const SYNTHETIC_TRUTH = JSON.parse(readSynthetic('truth.json')) as SyntheticTruth;

function readTrace(at: number): FitTrace {
	const [head = '', ...lines] = readSynthetic(`trace-${at + 1}.csv`)
		.trim()
		.split('\n');
	const rows = lines.map((line) => line.split(',').map((cell) => (cell === '' ? NaN : Number(cell))));
	const [timeS, ...columns] = head
		.split(',')
		.map((_, column) => Float64Array.from(rows, (row) => row[column]!));
	const names = head.split(',').slice(1);
	return {
		startedAtHour: SYNTHETIC_TRUTH.days[at]!.start.hour,
		timeS: timeS!,
		channels: Object.fromEntries(names.map((name, column) => [name, columns[column]!]))
	};
}

/** The three traces with the scenarios that an engineer would have for them: everything but the true coefficients. */
export function readSyntheticTraces(): TraceToFit[] {
	return SYNTHETIC_TRUTH.days.map((day, at) => ({ trace: readTrace(at), scenario: parseScenario(day) }));
}

/** The six coefficients that are not what the defaults say, as they are believed beforehand. */
export const SYNTHETIC_COEFFICIENTS: readonly FittedCoefficient[] = [
	{ group: 'bay', key: 'leakClosed', prior: { law: 'lognormal', middle: 20, spread: 0.4 } },
	{ group: 'bay', key: 'share', prior: { law: 'logit-normal', middle: 0.6, spread: 0.6 } },
	{ group: 'exhaust', key: 'gasConductanceFull', prior: { law: 'lognormal', middle: 45, spread: 0.3 } },
	{ group: 'engine', key: 'heatCapacity', prior: { law: 'lognormal', middle: 180e3, spread: 0.2 } },
	{ group: 'position', key: 'bayAirFraction', prior: { law: 'logit-normal', middle: 0.85, spread: 0.7 } },
	{ group: 'battery', key: 'caseCellConductance', prior: { law: 'lognormal', middle: 2.5, spread: 0.35 } }
];
