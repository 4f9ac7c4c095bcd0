import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { simulateScenario } from '../lib/thermal';
import { compareRuns, findMedian, formatTable, timeSteadily, type BenchRow } from './lib/bench-table';
import { ENGINE_CASES } from '../../tests/reference/support/cases';
import { completeCase, type CaseInput } from '../../tests/reference/support/defaults';
import type { ReferenceIntegrator } from '../../tests/reference/support/integrator';
import { MODEL_STATE } from '../../tests/reference/support/model-equations';
import { runReference, type ReferenceRun } from '../../tests/reference/support/reference-run';

/** Days of about 24 hours, each once through all contenders in turn. */
const DAYS = ENGINE_CASES.filter(({ input }) => {
	const minutes = input.legs.reduce((sum, leg) => sum + leg.minutes, 0);
	return minutes >= 1000 && minutes <= 1500;
}).slice(0, 4);
const ROUNDS = 9;

function runEngine(input: CaseInput): ReferenceRun {
	const result = simulateScenario(input);
	if (result.status === 'failed') throw new Error(result.reason);
	const { report, minutes } = result;
	const columns = MODEL_STATE.map((name) => (name === 'soc' ? minutes.soc : minutes.nodes[name]));
	return {
		minutes: Array.from({ length: minutes.count }, (_, minute) => columns.map((column) => column[minute]!)),
		end: [],
		events: report.events,
		evaluations: report.evaluations
	};
}

interface Contender {
	/** What the clock sees. */
	time: (input: CaseInput) => unknown;
	/** What is compared. */
	run: (input: CaseInput) => ReferenceRun;
}

const reference = (integrate: ReferenceIntegrator): Contender => {
	const run = (input: CaseInput) => runReference(completeCase(input), integrate);
	return { time: run, run };
};
const loadOdex = async (tolerance: number) =>
	(await import('../../tests/reference/support/odex')).integrateWithOdex(tolerance);

/**
 * The libraries run with settings that keep every node within 0.05 K and every event within 5 s on these days; three
 * times looser ones do not. The engine runs as it is, tighter than that. Each is loaded only where it runs: to have
 * mathjs in the process alone makes everything else slower.
 */
const CONTENDERS: Readonly<Record<string, () => Promise<Contender>>> = {
	engine: () => Promise.resolve({ time: simulateScenario, run: runEngine }),
	odex: async () => reference(await loadOdex(3e-4)),
	'mathjs solveODE': async () => {
		const { integrateWithMathjs } = await import('../../tests/reference/support/mathjs');
		return reference(integrateWithMathjs(3e-4, 60));
	}
};

/** One contender in a process of its own, so that none runs on what another has done to the compiler: times on request. */
async function serve(name: string): Promise<void> {
	const { time } = await CONTENDERS[name]!();
	process.on('message', (day: number) => process.send?.(timeSteadily(() => time(DAYS[day]!.input))));
}

async function askTime(contender: ChildProcess, day: number): Promise<number> {
	contender.send(day);
	const [timeMs] = (await once(contender, 'message')) as [number];
	return timeMs;
}

/** All contenders take turns in each round, so that whatever else the machine does falls on all of them. */
async function takeTurns(
	contenders: ReadonlyMap<string, ChildProcess>,
	day: number
): Promise<Map<string, number>> {
	const times = new Map([...contenders.keys()].map((name) => [name, [] as number[]]));
	for (let round = 0; round < ROUNDS; round++) {
		for (const [name, contender] of contenders) times.get(name)!.push(await askTime(contender, day));
	}
	return new Map([...times].map(([name, all]) => [name, findMedian(all)]));
}

async function compare(): Promise<void> {
	const self = fileURLToPath(import.meta.url);
	const contenders = new Map(Object.keys(CONTENDERS).map((name) => [name, fork(self, [name])]));
	const tight = await loadOdex(1e-8);
	for (const [day, { name, input }] of DAYS.entries()) {
		const truth = runReference(completeCase(input), tight);
		const times = await takeTurns(contenders, day);
		const rows: BenchRow[] = [];
		for (const [each, load] of Object.entries(CONTENDERS)) {
			const { run } = await load();
			rows.push({ name: each, medianMs: times.get(each)!, ...compareRuns(run(input), truth) });
		}
		console.log(
			`\n${name}: ${truth.minutes.length - 1} min, ${truth.events.length} events, median of ${ROUNDS} rounds`
		);
		console.log(formatTable(rows));
	}
	for (const contender of contenders.values()) contender.disconnect();
}

const [asked] = process.argv.slice(2);
if (asked) await serve(asked);
else await compare();
