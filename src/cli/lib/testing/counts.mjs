/**
 * @typedef {{ passed: number, failed: number, remarks: string[] }} Counts
 */

/** @returns {Counts} */
export function noCounts() {
	return { passed: 0, failed: 0, remarks: [] };
}

/** @param {Counts[]} all @returns {Counts} */
export function sumCounts(all) {
	return {
		passed: all.reduce((sum, { passed }) => sum + passed, 0),
		failed: all.reduce((sum, { failed }) => sum + failed, 0),
		remarks: all.flatMap(({ remarks }) => remarks)
	};
}

/**
 * A check that either holds as a whole or does not.
 * @param {number} code how the program ended
 * @returns {Counts}
 */
export function wholeCheck(code) {
	return { ...noCounts(), passed: code === 0 ? 1 : 0, failed: code === 0 ? 0 : 1 };
}

/**
 * Counts from vitest's JSON report. A test that was skipped shows nothing, so it counts as failed; so does a file
 * that could not be read.
 * @param {unknown} report
 * @returns {Counts}
 */
export function vitestCounts(report) {
	const files = fieldOf(report, 'testResults');
	if (!Array.isArray(files)) return noCounts();
	return sumCounts(files.map(fileCounts));
}

/** @param {unknown} file @returns {Counts} */
function fileCounts(file) {
	const tests = fieldOf(file, 'assertionResults');
	const statuses = Array.isArray(tests) ? tests.map((test) => fieldOf(test, 'status')) : [];
	const passed = statuses.filter((status) => status === 'passed').length;
	const broken = statuses.filter((status) => status === 'failed').length;
	const skipped = statuses.length - passed - broken;
	const unread = fieldOf(file, 'status') === 'failed' && broken === 0 ? 1 : 0;
	const name = String(fieldOf(file, 'name'));
	return {
		passed,
		failed: broken + skipped + unread,
		remarks: [
			...(skipped ? [`${name}: ${skipped} skipped, which counts as failed`] : []),
			...(unread ? [`${name}: failed as a whole`] : [])
		]
	};
}

/**
 * Counts from Playwright's JSON report, with the same rule for what was skipped.
 * @param {unknown} report
 * @returns {Counts}
 */
export function playwrightCounts(report) {
	const stats = fieldOf(report, 'stats');
	const count = (/** @type {string} */ name) => Number(fieldOf(stats, name) ?? 0);
	const errors = fieldOf(report, 'errors');
	const outside = Array.isArray(errors) ? errors.length : 0;
	return {
		passed: count('expected'),
		failed: count('unexpected') + count('flaky') + count('skipped') + outside,
		remarks: [
			...(count('skipped') ? [`${count('skipped')} skipped, which counts as failed`] : []),
			...(count('flaky') ? [`${count('flaky')} passed only at a second try, which counts as failed`] : [])
		]
	};
}

/**
 * Holds a runner's report against how the runner ended: a crash, or no test at all, is a failure too.
 * @param {Counts} counts
 * @param {number} code
 * @returns {Counts}
 */
export function heldAgainstEnding(counts, code) {
	if (counts.failed > 0) return counts;
	if (code !== 0) {
		return { ...counts, failed: 1, remarks: [...counts.remarks, `the runner itself failed (code ${code})`] };
	}
	if (counts.passed === 0) return { ...counts, failed: 1, remarks: [...counts.remarks, 'no test ran'] };
	return counts;
}

/** @param {{ passed: number, failed: number }} counts */
export function lastLine({ passed, failed }) {
	return `${passed} passed, ${failed} failed`;
}

/** @param {unknown} of @param {string} name @returns {unknown} */
function fieldOf(of, name) {
	return typeof of === 'object' && of !== null
		? /** @type {Record<string, unknown>} */ (of)[name]
		: undefined;
}
