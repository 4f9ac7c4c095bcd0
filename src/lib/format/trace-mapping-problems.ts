import type { TraceProposalView } from '../schemas/traces';
import { CHANNEL_LAWS, isTimeZone, TRACE_UNITS, type TraceChannel, type TraceUnit } from '../thermal/traces';
import { UNIT_NAMES } from '../schemas/traces';
import { joinWords } from './join-words';
import { isEpoch, readHour, type MappingDraft } from './trace-mapping-form';
import { CHANNEL_WORDS } from './traces';

interface BoxProblem {
	path: string;
	message: string;
}

/** What the box of the zone is called: it depends on how the time is told. */
export const zoneLabel = (timeKind: string | undefined): string =>
	isEpoch(timeKind) ? 'Time zone where it was driven' : 'Time zone of the logger’s clock';

const hasZone = (kind: string | undefined): boolean =>
	isEpoch(kind) || kind === 'calendar' || kind === 'time-of-day';

interface Chosen {
	number: number;
	channel: TraceChannel;
	unit: TraceUnit;
}

/** The columns that are read, with what was chosen for each. */
function listChosen(draft: MappingDraft, { columns }: TraceProposalView): Chosen[] {
	return columns.flatMap(({ number }) => {
		const channel = draft[`channel.${number}`] as TraceChannel | '' | undefined;
		return channel ? [{ number, channel, unit: draft[`unit.${number}`] as TraceUnit }] : [];
	});
}

function findUnitProblem({ number, channel, unit }: Chosen): BoxProblem[] {
	const { quantity } = CHANNEL_LAWS[channel];
	if (TRACE_UNITS[unit]?.quantity === quantity) return [];
	const units = UNIT_NAMES.filter((each) => TRACE_UNITS[each].quantity === quantity);
	const message = `Column ${number} is ${CHANNEL_WORDS[channel]}: that is measured in ${joinWords(units, 'or')}, not in ${unit}.`;
	return [{ path: `unit.${number}`, message }];
}

function findTwice(chosen: readonly Chosen[]): BoxProblem[] {
	return chosen.flatMap(({ number, channel }, at) => {
		const first = chosen.findIndex((each) => each.channel === channel);
		if (first === at) return [];
		const name = CHANNEL_WORDS[channel];
		const message = `Column ${number} is ${name}, and so is column ${chosen[first]!.number}: choose one of them, and leave the other out.`;
		return [{ path: `channel.${number}`, message }];
	});
}

/** Where the time stands, a column can be nothing else. */
function findTimeColumnProblems(
	{ timeColumn, clockColumn, timeKind }: MappingDraft,
	chosen: readonly Chosen[]
): BoxProblem[] {
	const clock = timeKind === 'calendar' ? clockColumn : '';
	const problems: BoxProblem[] = [];
	if (clock && clock === timeColumn) {
		const message = `The time of day has a column of its own: column ${clock} has the date already. Choose “No”, or another column.`;
		problems.push({ path: 'clockColumn', message });
	}
	for (const { number, channel } of chosen.filter((each) => [timeColumn, clock].includes(`${each.number}`))) {
		const path = String(number) === timeColumn ? 'timeColumn' : 'clockColumn';
		const message = `Column ${number} tells the time, and is said to be ${CHANNEL_WORDS[channel]}, too: choose another column, or leave that out.`;
		problems.push({ path, message });
	}
	return problems;
}

function findColumnProblems(draft: MappingDraft, proposal: TraceProposalView): BoxProblem[] {
	const chosen = listChosen(draft, proposal);
	if (chosen.length === 0) {
		const first = proposal.columns.find(({ number }) => String(number) !== draft.timeColumn);
		const path = first ? `channel.${first.number}` : '';
		return [{ path, message: 'Say of at least one column what it measures.' }];
	}
	return [...chosen.flatMap(findUnitProblem), ...findTwice(chosen), ...findTimeColumnProblems(draft, chosen)];
}

const DAY = /^\d{4}-\d{2}-\d{2}$/;

function isDay(text: string): boolean {
	const at = new Date(`${text}T00:00:00Z`);
	return DAY.test(text) && !Number.isNaN(at.getTime()) && at.toISOString().startsWith(text);
}

function findTimeProblems({
	timeKind,
	timeZone = '',
	firstDay = '',
	startHour = ''
}: MappingDraft): BoxProblem[] {
	const problems: BoxProblem[] = [];
	if (hasZone(timeKind) && !isTimeZone(timeZone)) {
		const said = timeZone === '' ? 'it is empty' : `there is none called “${timeZone}”`;
		const message = `${zoneLabel(timeKind)}: ${said}. Write its IANA name, such as Australia/Darwin.`;
		problems.push({ path: 'timeZone', message });
	}
	if (timeKind === 'time-of-day' && firstDay !== '' && !isDay(firstDay)) {
		const message = `Date of the first row: “${firstDay}” is no date. Write it such as 2026-02-03, or leave it empty.`;
		problems.push({ path: 'firstDay', message });
	}
	if (Number.isNaN(readHour(startHour))) {
		const message = `Time of day at the start: “${startHour}” is no time of day. Write it such as 06:30, or leave it empty.`;
		problems.push({ path: 'startHour', message });
	}
	return problems;
}

/** Everything that cannot be of what stands in the boxes about a file's columns, each at its box and by its label. */
export const listMappingProblems = (draft: MappingDraft, proposal: TraceProposalView): BoxProblem[] => [
	...findColumnProblems(draft, proposal),
	...findTimeProblems(draft)
];
