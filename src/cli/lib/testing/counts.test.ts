import { describe, expect, it } from 'vitest';
import {
	heldAgainstEnding,
	lastLine,
	noCounts,
	playwrightCounts,
	sumCounts,
	vitestCounts,
	wholeCheck
} from './counts.mjs';

const file = (status: string, ...tests: string[]) => ({
	name: 'a.test.ts',
	status,
	assertionResults: tests.map((each) => ({ status: each }))
});

describe('vitestCounts', () => {
	it.each([
		['passed and failed', [file('failed', 'passed', 'failed', 'passed')], 2, 1],
		['a skipped test counts as failed', [file('passed', 'passed', 'pending', 'skipped', 'todo')], 1, 3],
		['a file that could not be read counts as failed', [file('failed'), file('passed', 'passed')], 1, 1],
		['a file whose hook failed after its tests passed', [file('failed', 'passed')], 1, 1],
		['no file', [], 0, 0]
	])('%s', (_case, testResults, passed, failed) => {
		expect(vitestCounts({ testResults })).toMatchObject({ passed, failed });
	});

	it('finds nothing in a report that is not there', () => {
		expect(vitestCounts(null)).toEqual(noCounts());
	});
});

describe('playwrightCounts', () => {
	it.each([
		['all well', { stats: { expected: 5, unexpected: 0, flaky: 0, skipped: 0 }, errors: [] }, 5, 0],
		['everything else', { stats: { expected: 5, unexpected: 2, flaky: 1, skipped: 3 }, errors: [{}] }, 5, 7],
		['no report', null, 0, 0]
	])('%s', (_case, report, passed, failed) => {
		expect(playwrightCounts(report)).toMatchObject({ passed, failed });
	});
});

describe('heldAgainstEnding', () => {
	it.each([
		['all well', 3, 0, 0, 3, 0],
		['a runner that crashed after its tests', 3, 0, 1, 3, 1],
		['a runner that ran nothing', 0, 0, 0, 0, 1],
		['failures are counted once', 3, 2, 1, 3, 2]
	])('%s', (_case, passed, failed, code, expectedPassed, expectedFailed) => {
		const counts = heldAgainstEnding({ passed, failed, remarks: [] }, code);
		expect(counts).toMatchObject({ passed: expectedPassed, failed: expectedFailed });
	});
});

describe('the last line', () => {
	it('sums over everything', () => {
		const all = [wholeCheck(0), wholeCheck(2), { passed: 40, failed: 1, remarks: ['x'] }];
		expect(lastLine(sumCounts(all))).toBe('41 passed, 2 failed');
	});
});
