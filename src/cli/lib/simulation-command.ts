import { ScenarioError, showValue, simulateScenario } from '../../lib/thermal';

/** What the program writes and how it ends. */
export interface CommandOutcome {
	exitCode: 0 | 2 | 3;
	stdout: string;
	stderr: string;
}

/** A fault of the input, in the same five fields whatever it is. */
interface Fault {
	code: string;
	path: string;
	value: unknown;
	limit: string;
	message: string;
}

const BAD_INPUT = 2;
const NUMERICAL_FAILURE = 3;

export function refuse({ code, path, value, limit, message }: Fault): CommandOutcome {
	const fault = { code, path, value: showValue(value), limit, message };
	return { exitCode: BAD_INPUT, stdout: '', stderr: `${JSON.stringify(fault)}\n` };
}

function parseJson(text: string): { value: unknown } | CommandOutcome {
	try {
		return { value: JSON.parse(text.replace(/^\uFEFF/, '')) };
	} catch (error) {
		const reason = error instanceof Error ? error.message : String(error);
		return refuse({
			code: 'not_json',
			path: '',
			value: text,
			limit: 'one JSON object',
			message: `The input is not JSON: ${reason}`
		});
	}
}

/** Reads a scenario, runs it and says what came out. */
export function runSimulationCommand(text: string): CommandOutcome {
	const parsed = parseJson(text);
	if ('exitCode' in parsed) return parsed;
	try {
		const result = simulateScenario(parsed.value);
		if (result.status === 'done') {
			return { exitCode: 0, stdout: `${JSON.stringify(result.report)}\n`, stderr: '' };
		}
		const failure = { code: 'numerical_failure', message: result.reason, ...result };
		return { exitCode: NUMERICAL_FAILURE, stdout: '', stderr: `${JSON.stringify(failure)}\n` };
	} catch (error) {
		if (error instanceof ScenarioError) return refuse(error);
		throw error;
	}
}
