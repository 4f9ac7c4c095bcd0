import type { SignedInPerson } from '$lib/schemas/people';
import { simulateScenario, type SimulationReport } from '$lib/thermal';
import { spend } from '../auth/rate-limit';
import { AppError } from '../errors';
import { allow } from '../policies';
import { asInputError } from './input-error';

/** A run holds the process while it lasts, so one person may not ask for any number of them. */
const RUNS = { points: 300, windowS: 10 * 60 };

/** Runs a scenario that a person or program wrote; stores nothing. */
export async function simulate(person: SignedInPerson, input: unknown): Promise<SimulationReport> {
	allow(person, 'assessments.run');
	await spend({ name: 'simulation', key: String(person.id), ...RUNS });
	return runOnce(input);
}

/** The same without a person: one run, or the error that says what was wrong with it. */
export function runOnce(input: unknown): SimulationReport {
	try {
		const result = simulateScenario(input);
		if (result.status === 'done') return result.report;
		throw new AppError('simulation_failed', `The run could not be finished: ${result.reason}`);
	} catch (error) {
		throw asInputError(error);
	}
}
