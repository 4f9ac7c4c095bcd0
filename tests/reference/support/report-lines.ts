import { allowedDeviation, STANDINGS, type CheckResult } from './check-against';

/** A check with what became of its test. */
export interface ReportedCheck extends CheckResult {
	/** Whether the test passed, as the runner says: the report never decides that itself. */
	met: boolean;
	/** What the test said when it did not pass. */
	trouble: string | null;
}

/** A test, or a whole file, that failed and holds no check. */
export interface OtherTrouble {
	name: string;
	trouble: string;
}

export interface ReportContent {
	checks: ReportedCheck[];
	/** Tests that check something else than a published value. */
	others: { passed: number; failed: OtherTrouble[]; skipped: number };
	/** Files that could not be read, and errors outside any test. */
	broken: OtherTrouble[];
}

const DIGITS = 7;

function showNumber(value: number): string {
	return Number.isFinite(value) ? String(Number(value.toPrecision(DIGITS))) : String(value);
}

function showShare(part: number, whole: number): string {
	return whole === 0 ? '' : ` (${(Math.abs(part / whole) * 100).toPrecision(2)} %)`;
}

function describeDeviation({ computed, expected }: ReportedCheck): string {
	if (computed === null) return 'nothing computed';
	const deviation = computed - expected;
	return `computed ${showNumber(computed)}, off by ${showNumber(deviation)}${showShare(deviation, expected)}`;
}

function writeCheck(check: ReportedCheck): string[] {
	const unit = check.unit === '' ? '' : ` ${check.unit}`;
	return [
		`  ${check.met ? 'met   ' : 'MISSED'}  ${check.name}`,
		`          ${check.place} · ${check.standing}`,
		`          expected ${showNumber(check.expected)}${unit}, ${describeDeviation(check)}`,
		`          allowed ${showNumber(allowedDeviation(check))}${unit}: ${check.because}`,
		...(check.trouble === null ? [] : [`          ${check.trouble}`])
	];
}

function groupBySource(checks: ReportedCheck[]): Map<string, ReportedCheck[]> {
	const groups = new Map<string, ReportedCheck[]>();
	for (const check of checks) groups.set(check.source, [...(groups.get(check.source) ?? []), check]);
	return new Map([...groups].sort(([one], [other]) => one.localeCompare(other)));
}

function countMet(checks: ReportedCheck[]): string {
	const met = checks.filter((check) => check.met).length;
	return `${checks.length} declared, ${met} met, ${checks.length - met} missed`;
}

/** Names that more than one check has: each stands for one value. */
function listSharedNames(checks: ReportedCheck[]): string[] {
	const names = checks.map(({ name }) => name);
	return [...new Set(names.filter((name, at) => names.indexOf(name) !== at))];
}

function writeSummary({ checks, others, broken }: ReportContent): string[] {
	const missed = checks.filter(({ met }) => !met);
	return [
		'Checks against published values by standing',
		...STANDINGS.map(
			(standing) => `  ${standing}: ${countMet(checks.filter((check) => check.standing === standing))}`
		),
		...missed.map(({ name, source }) => `  missed: ${name} (${source})`),
		...listSharedNames(checks).map((name) => `  a name that several checks share: ${name}`),
		...broken.map(({ name, trouble }) => `  broken: ${name}: ${trouble}`),
		...others.failed.map(({ name, trouble }) => `  failed, no published value: ${name}: ${trouble}`),
		`Published values: ${countMet(checks)}.`,
		`Other tests: ${others.passed} passed, ${others.failed.length} failed, ${others.skipped} skipped.`,
		`Files that could not be run, and errors outside tests: ${broken.length}.`
	];
}

/** Every check with source, place, standing, deviation and tolerance, grouped by source, and the counts at the end. */
export function writeReport(content: ReportContent): string {
	const groups = [...groupBySource(content.checks)].flatMap(([source, checks]) => [
		`${source} — ${countMet(checks)}`,
		...checks.flatMap(writeCheck),
		''
	]);
	return [...groups, ...writeSummary(content), ''].join('\n');
}
