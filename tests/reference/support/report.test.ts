import { spawnSync, type SpawnSyncReturns } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { beforeAll, describe, expect, it } from 'vitest';
import { writeReport, type ReportedCheck } from './report-lines';

const root = fileURLToPath(new URL('../../../', import.meta.url));

const RUN_FIXTURE = [
	'node_modules/vitest/vitest.mjs',
	'run',
	'--config=tests/reference/support/report-fixture.config.ts',
	'--reporter=./tests/reference/support/report.ts'
];

const MET: ReportedCheck = {
	name: 'heat of a strip',
	source: 'A handbook, 6th ed.',
	place: 'ex. 7.2',
	standing: 'read in the source',
	expected: 1370,
	unit: 'W',
	tolerance: { relative: 0.001 },
	because: 'printed as a whole number',
	computed: 1370.4,
	met: true,
	trouble: null
};
const MISSED: ReportedCheck = {
	...MET,
	name: 'heat of the next',
	computed: 1400,
	met: false,
	trouble: 'far off'
};
const NOTHING_ELSE = { others: { passed: 3, failed: [], skipped: 1 }, broken: [] };

describe('the report of the checks against published values', () => {
	it('says of a check its source, place, standing, values, deviation, tolerance and why', () => {
		const report = writeReport({ checks: [MET], ...NOTHING_ELSE });
		for (const part of [
			'A handbook, 6th ed. — 1 declared, 1 met, 0 missed',
			'met     heat of a strip',
			'ex. 7.2 · read in the source',
			'expected 1370 W, computed 1370.4, off by 0.4 (0.029 %)',
			'allowed 1.37 W: printed as a whole number',
			'Published values: 1 declared, 1 met, 0 missed.',
			'Other tests: 3 passed, 0 failed, 1 skipped.'
		]) {
			expect(report).toContain(part);
		}
	});

	it('shows a missed check in its group, by name at the end, and in the counts', () => {
		const report = writeReport({ checks: [MET, MISSED], ...NOTHING_ELSE });
		expect(report).toContain('MISSED  heat of the next');
		expect(report).toContain('far off');
		expect(report).toContain('missed: heat of the next (A handbook, 6th ed.)');
		expect(report).toContain('read in the source: 2 declared, 1 met, 1 missed');
	});

	it('names a file that could not be run, and a name that two checks share', () => {
		const broken = [{ name: 'a.test.ts', trouble: 'no such module' }];
		const report = writeReport({ checks: [MET, MET], others: NOTHING_ELSE.others, broken });
		expect(report).toContain('broken: a.test.ts: no such module');
		expect(report).toContain('a name that several checks share: heat of a strip');
		expect(report).toContain('Files that could not be run, and errors outside tests: 1.');
	});

	it('puts the checks of one source together, sources in the order of the alphabet', () => {
		const elsewhere = { ...MET, source: 'A book before it' };
		const report = writeReport({ checks: [MET, elsewhere, MISSED], ...NOTHING_ELSE });
		expect(report.indexOf('A book before it — 1')).toBeLessThan(report.indexOf('A handbook, 6th ed. — 2'));
	});
});

describe('a run with missed checks', () => {
	let run: SpawnSyncReturns<string>;
	beforeAll(() => {
		run = spawnSync(process.execPath, RUN_FIXTURE, { cwd: root, encoding: 'utf8' });
	}, 60_000);

	it('ends as a failed one', () => {
		expect(run.status).toBe(1);
	});

	it.each([
		['met     a third'],
		['MISSED  a half for a third'],
		['expected 0.3333333 m, computed 0.5, off by 0.1666667 (50 %)'],
		['MISSED  a third that throws'],
		['nothing computed'],
		['no thirds today'],
		['MISSED  a third that is no number'],
		['failed, no published value: holds none and fails'],
		['Published values: 4 declared, 1 met, 3 missed.'],
		['Other tests: 1 passed, 1 failed, 0 skipped.']
	])('reports: %s', (line) => {
		expect(run.stdout).toContain(line);
	});
});
