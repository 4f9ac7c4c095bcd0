import { formatKelvin } from '../../../format/numbers';
import { formatHours } from '../../../format/time';
import { sayVerdict } from '../../../format/verdict';
import type { AssessmentRow, MountOutcome } from '../../../schemas/assessments';
import { hasBms } from '../../../schemas/batteries';
import type { CableReport } from '../../../schemas/outlook-reports';
import type { ReportLine } from '../../../schemas/reports';

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
