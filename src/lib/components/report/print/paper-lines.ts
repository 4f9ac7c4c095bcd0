import { formatDateTime } from '../../../format/dates';
import { formatKelvin } from '../../../format/numbers';
import { formatHours } from '../../../format/time';
import { sayVerdict } from '../../../format/verdict';
import type { AssessmentRow, MountOutcome } from '../../../schemas/assessments';
import { hasBms } from '../../../schemas/batteries';
import type { CableReport, OutlookReport } from '../../../schemas/outlook-reports';
import type { PreDrillSnapshot } from '../../../schemas/pre-drill';
import type { ReportDerivation, ReportLine } from '../../../schemas/reports';

/** Over the pages of photos. */
export const PHOTOS_TITLE = 'What was seen before it was recommended';

/** A proposed cable and fuse as lines of the paper: what, in which air, what came of it. */
export function listCableLines(cable: CableReport | null): ReportLine[] {
	if (cable === null) return [{ label: 'Proposed', value: 'none' }];
	return [
		{ label: 'Proposed', value: cable.proposal },
		{ label: 'In its heat', value: cable.air },
		...cable.findings.map(({ label, holds, value, limit }) => ({
			label,
			value: `${holds ? 'yes' : 'no'}, ${value} of at most ${limit}`
		})),
		{ label: 'All in all', value: `${cable.sentence} The makers’ own curves come first.` }
	];
}

/** How long a mount is dark; where nothing is ever switched off, there is no dark to tell of. */
export function sayDark({ darkHours, chemistry }: AssessmentRow): string {
	if (!hasBms(chemistry)) return 'has no cut-off';
	return darkHours > 0 ? formatHours(darkHours) : 'none';
}

function sayMount(assessment: AssessmentRow): string {
	const { verdict, headroomK, chemistry } = assessment;
	const dark = hasBms(chemistry) ? `, dark ${sayDark(assessment)}` : '';
	return `${sayVerdict(verdict, chemistry)}, headroom ${formatKelvin(headroomK)}${dark}`;
}

/** The other mounts where a table has no room. */
export function listMountLines(others: readonly MountOutcome[]): ReportLine[] {
	return others.map(({ letter, name, assessment }) => ({
		label: `${letter}: ${name}`,
		value: assessment ? sayMount(assessment) : 'not assessed'
	}));
}

/** What the estimate says beside its number, under a word each. */
export function listOutlookLines({ chance, year, remedies, envelope, life }: OutlookReport): ReportLine[] {
	return [
		{ label: 'How sure', value: `${chance.sentence} ${chance.interval} ${chance.band}` },
		{ label: 'In a year', value: year.sentence },
		{ label: 'What it would take', value: `${remedies.sentence} ${remedies.hotter}`.trim() },
		{ label: 'How hot a day', value: envelope.sentence },
		{ label: 'How it wears', value: life.sentence }
	];
}

/** Values that came about in the same way, told together; what was entered is told among the inputs already. */
export function listDerived(derivations: readonly ReportDerivation[]): ReportLine[] {
	const values: Record<string, string[]> = {};
	for (const { label, value, basis, isEntered } of derivations) {
		if (!isEntered) (values[basis] ??= []).push(`${label}: ${value}`);
	}
	return Object.entries(values).map(([basis, told]) => ({ label: told.join('; '), value: basis }));
}

/** How the check before drilling stood, in a sentence or two. */
export function sayCheck(check: PreDrillSnapshot, where = ''): string {
	const { open, signedBy, signedAt } = check;
	const points = open.length === 1 ? 'one point is' : `${open.length} points are`;
	const stand = open.length === 0 ? 'all points hold.' : `${points} open${where}.`;
	const signed =
		signedBy && signedAt ? `Signed by ${signedBy}, ${formatDateTime(signedAt)}.` : 'Nobody has signed it.';
	return `${stand} ${signed}`;
}

/** The points that stayed open, for a list. */
export function listOpenLines(check: PreDrillSnapshot | null): ReportLine[] {
	const open = check?.open ?? [];
	const failed = open
		.filter(({ state }) => state === 'failed')
		.map(({ label, note }) => ({ label, value: `does not hold. ${note}` }));
	const unanswered = open.filter(({ state }) => state === 'unanswered');
	if (unanswered.length === 0) return failed;
	return [
		...failed,
		{ label: 'Not answered', value: unanswered.map(({ label }) => label.toLowerCase()).join(', ') }
	];
}

/** What has room beside everything else on two pages; the picture shows every leg. */
const MOST_LEGS = 12;

/** The legs of the day; of very many the first ones and the last. */
export function listLegLines(legs: readonly ReportLine[]): ReportLine[] {
	if (legs.length <= MOST_LEGS) return [...legs];
	const shown = legs.slice(0, MOST_LEGS - 1);
	const last = legs.at(-1)!;
	const rest = {
		label: `And ${legs.length - shown.length} more`,
		value: `the last from ${last.label}, ${last.value}`
	};
	return [...shown, rest];
}
