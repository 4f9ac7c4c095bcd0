import { simulateScenario } from '../lib/thermal';
import { compareRuns, formatTable, measureInterleaved, type Contender } from './lib/bench-table';
import { ENGINE_CASES } from '../../tests/reference/support/cases';
import { completeCase, type CaseInput } from '../../tests/reference/support/defaults';
import { integrateWithMathjs, integrateWithOdex } from '../../tests/reference/support/libraries';
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

/**
 * The libraries run with settings that keep every node within 0.05 K and every event within 5 s on these days; three
 * times looser ones do not. The engine runs as it is, tighter than that.
 */
const CONTENDERS: readonly Contender<CaseInput, ReferenceRun>[] = [
	{ name: 'engine', time: (input) => simulateScenario(input), run: runEngine },
	{
		name: 'odex',
		time: (input) => runReference(completeCase(input), integrateWithOdex(3e-4)),
		run: (input) => runReference(completeCase(input), integrateWithOdex(3e-4))
	},
	{
		name: 'mathjs solveODE',
		time: (input) => runReference(completeCase(input), integrateWithMathjs(3e-4, 60)),
		run: (input) => runReference(completeCase(input), integrateWithMathjs(3e-4, 60))
	}
];

const tight = integrateWithOdex(1e-8);
for (const { name, input } of DAYS) {
	const truth = runReference(completeCase(input), tight);
	const times = measureInterleaved(CONTENDERS, input, ROUNDS);
	const rows = CONTENDERS.map((contender) => ({
		name: contender.name,
		medianMs: times.get(contender.name)!,
		...compareRuns(contender.run(input), truth)
	}));
	console.log(
		`\n${name}: ${truth.minutes.length - 1} min, ${truth.events.length} events, median of ${ROUNDS} rounds`
	);
	console.log(formatTable(rows));
}
