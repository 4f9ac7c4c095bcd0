import type { SignedInPerson } from '$lib/schemas/people';
import { ScenarioError, showValue, simulateScenario, type SimulationReport } from '$lib/thermal';
import { AppError } from '../errors';
import { allow } from '../policies';

/** A scenario that cannot be run, as the input error that it is: where, what, and what would have been right. */
export function asInputError(error: unknown): unknown {
	if (error instanceof ScenarioError) {
		const { code, path, limit, message } = error;
		return new AppError('invalid_input', message, [
			{ code, path, value: showValue(error.value), limit, message }
		]);
	}
	return error;
}

/** Runs a scenario that a person or program wrote; stores nothing. */
export function simulate(person: SignedInPerson, input: unknown): SimulationReport {
	allow(person, 'assessments.run');
	try {
		const result = simulateScenario(input);
		if (result.status === 'done') return result.report;
		throw new AppError('simulation_failed', `The run could not be finished: ${result.reason}`);
	} catch (error) {
		throw asInputError(error);
	}
}
