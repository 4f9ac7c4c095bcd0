import { simulateScenario } from '../../lib/thermal';
import { ENGINE_CASES } from '../../../tests/reference/support/cases';
import { completeCase, type CaseInput } from '../../../tests/reference/support/defaults';
import type { ReferenceIntegrator } from '../../../tests/reference/support/integrator';
import { MODEL_STATE } from '../../../tests/reference/support/model-equations';
import { runReference, type ReferenceRun } from '../../../tests/reference/support/reference-run';
import { compareRuns, timeSteadily, warmUp, type Deviation } from './bench-table';

/** Days of about 24 hours, each once through all contenders in turn. */
export const DAYS = ENGINE_CASES.filter(({ input }) => {
	const minutes = input.legs.reduce((sum, leg) => sum + leg.minutes, 0);
	return minutes >= 1000 && minutes <= 1500;
}).slice(0, 4);

export interface Contender {
	warmUp: (day: number) => void;
	/** Milliseconds of one run of a day among many. */
	time: (day: number) => number;
	/** How far its run of a day is from a much tighter one. */
	compare: (day: number, truth: ReferenceRun) => Deviation;
}

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

function contend(
	run: (input: CaseInput) => ReferenceRun,
	timed: (input: CaseInput) => unknown = run
): Contender {
	return {
		warmUp: (day) => warmUp(() => timed(DAYS[day]!.input)),
		time: (day) => timeSteadily(() => timed(DAYS[day]!.input)),
		compare: (day, truth) => compareRuns(run(DAYS[day]!.input), truth)
	};
}

const reference = (integrate: ReferenceIntegrator): Contender =>
	contend((input) => runReference(completeCase(input), integrate));
const loadOdex = async (tolerance: number): Promise<ReferenceIntegrator> =>
	(await import('../../../tests/reference/support/odex')).integrateWithOdex(tolerance);

/**
 * The libraries run with settings that keep every node within 0.05 K and every event within 5 s on these days; three
 * times looser ones do not. Each is loaded only where it runs: to have mathjs in the process alone makes everything else
 * slower.
 */
export const CONTENDERS: Readonly<Record<string, () => Promise<Contender>>> = {
	engine: () => Promise.resolve(contend(runEngine, simulateScenario)),
	odex: async () => reference(await loadOdex(3e-4)),
	'mathjs solveODE': async () => {
		const { integrateWithMathjs } = await import('../../../tests/reference/support/mathjs');
		return reference(integrateWithMathjs(3e-4, 60));
	}
};

/** The day as a much tighter integration has it. */
export async function findTruth(day: number): Promise<ReferenceRun> {
	return runReference(completeCase(DAYS[day]!.input), await loadOdex(1e-8));
}
