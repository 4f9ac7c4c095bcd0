import { ScenarioError, showValue } from '$lib/thermal';
import { AppError } from '../errors';

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
