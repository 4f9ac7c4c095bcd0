import type { TraceMappingInput, TraceProposalView } from '../schemas/traces';
import { DATE_ORDER_WORDS, zoneOf, type TraceChannel, type TraceUnit } from '../thermal/traces';
import { UNIT_NAMES } from '../schemas/traces';
import { CHANNEL_WORDS } from './traces';
import { TRACE_CHANNELS } from '../thermal/traces';

/** What stands in the boxes of the form about a file's columns, by their names. */
export type MappingDraft = Record<string, string>;

interface Choice {
	value: string;
	label: string;
}

export const TIME_KINDS: readonly Choice[] = [
	{ value: 'calendar', label: 'Date and time' },
	{ value: 'time-of-day', label: 'Time of day without a date' },
	{ value: 'epoch-s', label: 'Seconds since 1970 UTC' },
	{ value: 'epoch-ms', label: 'Milliseconds since 1970 UTC' },
	{ value: 'elapsed-s', label: 'Seconds from the start' },
	{ value: 'elapsed-min', label: 'Minutes from the start' }
];

export const ORDER_CHOICES: readonly Choice[] = DATE_ORDER_WORDS.map(({ order, words }) => ({
	value: order,
	label: words.charAt(0).toUpperCase() + words.slice(1)
}));

export const DECIMAL_CHOICES: readonly Choice[] = [
	{ value: '.', label: 'Point: 38.5' },
	{ value: ',', label: 'Comma: 38,5' }
];

export const CHANNEL_CHOICES: readonly Choice[] = [
	{ value: '', label: 'Leave out' },
	...TRACE_CHANNELS.map((channel) => ({ value: channel, label: CHANNEL_WORDS[channel] }))
];

export const UNIT_CHOICES: readonly Choice[] = UNIT_NAMES.map((unit) => ({ value: unit, label: unit }));

const OWN_UNITS: Readonly<Record<string, TraceUnit>> = { currentA: 'A', speedKmh: 'km/h' };
export const ownUnitOf = (channel: string): TraceUnit => OWN_UNITS[channel] ?? '°C';

const twoDigits = (value: number): string => String(value).padStart(2, '0');
/** 6.5 → "06:30", as a box for a time of day has it. */
export function writeHour(hour: number | null): string {
	if (hour === null) return '';
	const minutes = Math.round(hour * 60);
	return `${twoDigits(Math.floor(minutes / 60) % 24)}:${twoDigits(minutes % 60)}`;
}

/** "06:30" → 6.5; null for an empty box, NaN for what is no time of day. */
export function readHour(text: string): number | null {
	if (text.trim() === '') return null;
	const [, hour, minute] = /^\s*(\d{1,2})[:.](\d{2})(?::\d{2})?\s*$/.exec(text) ?? [];
	if (hour === undefined || Number(hour) > 23 || Number(minute) > 59) return NaN;
	return Number(hour) + Number(minute) / 60;
}

/** The boxes as a mapping fills them. */
export function toMappingDraft(
	{ decimal, time, columns }: TraceMappingInput,
	proposal: TraceProposalView,
	{ isSynthetic, startHour }: { isSynthetic: boolean; startHour: number | null }
): MappingDraft {
	const of = (number: number) => columns.find(({ column }) => column === number);
	const draft: MappingDraft = {
		decimal,
		timeKind: time.kind,
		timeColumn: String(time.column),
		clockColumn: time.kind === 'calendar' && time.clockColumn !== null ? String(time.clockColumn) : '',
		order: time.kind === 'calendar' ? time.order : 'ymd',
		timeZone: zoneOf(time) ?? 'UTC',
		firstDay: time.kind === 'time-of-day' ? (time.firstDay ?? '') : '',
		startHour: writeHour(startHour),
		isSynthetic: isSynthetic ? 'true' : ''
	};
	for (const { number } of proposal.columns) {
		const known = of(number);
		draft[`channel.${number}`] = known?.channel ?? '';
		draft[`unit.${number}`] = known?.unit ?? '°C';
		draft[`reversed.${number}`] = known?.reversed ? 'true' : '';
	}
	return draft;
}

/** Whether a kind of time counts from 1970, so that the zone says the time of day alone. */
export const isEpoch = (kind: string | undefined): boolean => kind === 'epoch-s' || kind === 'epoch-ms';

function readTime(draft: MappingDraft): unknown {
	const { timeKind: kind, timeZone } = draft;
	const column = Number(draft.timeColumn);
	if (kind === 'calendar') {
		const clockColumn = draft.clockColumn ? Number(draft.clockColumn) : null;
		return { kind, column, clockColumn, order: draft.order, timeZone };
	}
	if (kind === 'time-of-day') return { kind, column, firstDay: draft.firstDay || null, timeZone };
	return isEpoch(kind) ? { kind, column, timeZone } : { kind, column };
}

/** What the boxes say, for the schema to check. */
export function readMappingDraft(
	draft: MappingDraft,
	delimiter: string,
	proposal: TraceProposalView
): unknown {
	const columns = proposal.columns.flatMap(({ number }) => {
		const channel = draft[`channel.${number}`] as TraceChannel | '' | undefined;
		if (!channel) return [];
		const unit = draft[`unit.${number}`];
		return [{ column: number, channel, unit, reversed: draft[`reversed.${number}`] === 'true' }];
	});
	const startHour = readHour(draft.startHour ?? '');
	return {
		mapping: { version: 1, delimiter, decimal: draft.decimal, time: readTime(draft), columns },
		isSynthetic: draft.isSynthetic === 'true',
		startHour: startHour !== null && Number.isNaN(startHour) ? draft.startHour : startHour
	};
}
