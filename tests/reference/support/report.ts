import type { SerializedError } from 'vitest';
import type { Reporter, TestCase, TestModule } from 'vitest/node';
import { writeReport, type ReportContent } from './report-lines';

function firstLine(text: string | undefined): string {
	return text?.split('\n')[0] ?? 'no message';
}

function troubleOf(test: TestCase): string {
	const { errors = [] } = test.result();
	return errors.length === 0 ? 'it did not run' : firstLine(errors[0]?.message);
}

function addTest(content: ReportContent, test: TestCase): void {
	const { published } = test.meta();
	const { state } = test.result();
	if (published) {
		const met = state === 'passed';
		content.checks.push({ ...published, met, trouble: met ? null : troubleOf(test) });
	} else if (state === 'passed') content.others.passed += 1;
	else if (state === 'skipped') content.others.skipped += 1;
	else content.others.failed.push({ name: test.fullName, trouble: troubleOf(test) });
}

/** Errors of the file itself: it could not be read, or a hook of its suites failed. */
function errorsOf(testModule: TestModule): { name: string; trouble: string }[] {
	const suites = [testModule, ...testModule.children.allSuites()];
	return suites.flatMap((suite) =>
		suite.errors().map(({ message }) => ({ name: testModule.relativeModuleId, trouble: firstLine(message) }))
	);
}

/** Everything that the run holds, checks and the rest, so that nothing is left out of the report. */
export function gather(
	testModules: readonly TestModule[],
	unhandled: readonly SerializedError[]
): ReportContent {
	const content: ReportContent = {
		checks: [],
		others: { passed: 0, failed: [], skipped: 0 },
		broken: [
			...testModules.flatMap(errorsOf),
			...unhandled.map(({ message }) => ({ name: 'outside any test', trouble: firstLine(message) }))
		]
	};
	for (const testModule of testModules) {
		for (const test of testModule.children.allTests()) addTest(content, test);
	}
	return content;
}

/** Prints what every check against a published value came to. The runner keeps the say over the exit code. */
export default class PublishedValuesReporter implements Reporter {
	/** Done when all of it is written: the runner ends the process afterwards, and a pipe takes its time. */
	onTestRunEnd(testModules: readonly TestModule[], unhandled: readonly SerializedError[]): Promise<void> {
		const report = `\n${writeReport(gather(testModules, unhandled))}`;
		return new Promise((resolve) => process.stdout.write(report, () => resolve()));
	}
}
