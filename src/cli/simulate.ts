import { readFileSync } from 'node:fs';
import { refuse, runSimulationCommand, type CommandOutcome } from './lib/simulation-command';

const STDIN = 0;
const USAGE = 'one argument: the file of a scenario, or - for standard input';

function readInput(source: string): string | CommandOutcome {
	try {
		return readFileSync(source === '-' ? STDIN : source, 'utf8');
	} catch (error) {
		const reason = error instanceof Error ? error.message : String(error);
		return refuse({
			code: 'unreadable_file',
			path: '',
			value: source,
			limit: 'a file that can be read, or - for standard input',
			message: `The scenario cannot be read: ${reason}`
		});
	}
}

function simulate(sources: readonly string[]): CommandOutcome {
	const [source] = sources;
	if (source === undefined || sources.length > 1) {
		return refuse({
			code: 'wrong_arguments',
			path: '',
			value: sources.join(' '),
			limit: USAGE,
			message: `The program takes ${USAGE}.`
		});
	}
	const input = readInput(source);
	return typeof input === 'string' ? runSimulationCommand(input) : input;
}

const { exitCode, stdout, stderr } = simulate(process.argv.slice(2));
process.exitCode = exitCode;
process.stdout.write(stdout);
process.stderr.write(stderr);
