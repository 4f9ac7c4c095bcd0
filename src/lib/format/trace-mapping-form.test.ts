import { describe, expect, it } from 'vitest';
import { traceMappingChangeSchema, type TraceMappingInput, type TraceProposalView } from '../schemas/traces';
import { readHour, readMappingDraft, toMappingDraft, writeHour } from './trace-mapping-form';

const PROPOSAL: TraceProposalView = {
	...{ headerLine: 1, firstRowLine: 2, firstRows: [], timeWhy: '', notes: [], knownSince: null },
	columns: ['Date', 'Clock', 'Cell', 'Amps'].map((name, at) => ({ number: at + 1, name }))
};
const MAPPING: TraceMappingInput = {
	...{ version: 1, delimiter: ';', decimal: ',' },
	time: { kind: 'calendar', column: 1, clockColumn: 2, order: 'dmy', timeZone: 'Australia/Darwin' },
	columns: [
		{ column: 3, channel: 'cellC', unit: '°F', reversed: false },
		{ column: 4, channel: 'currentA', unit: 'mA', reversed: true }
	]
};

describe('the boxes about a file’s columns', () => {
	it.each<[string, TraceMappingInput['time']]>([
		['a date and a time of day', MAPPING.time],
		['a time of day alone', { kind: 'time-of-day', column: 2, firstDay: '2026-02-03', timeZone: 'UTC' }],
		['milliseconds since 1970', { kind: 'epoch-ms', column: 1, timeZone: 'Australia/Darwin' }],
		['seconds from the start', { kind: 'elapsed-s', column: 1 }]
	])('say with %s what the mapping says', (_what, time) => {
		const mapping = { ...MAPPING, time };
		const draft = toMappingDraft(mapping, PROPOSAL, { isSynthetic: true, startHour: 6.5 });
		const said = { ...(readMappingDraft(draft, ';', PROPOSAL) as object), version: 3 };
		expect(traceMappingChangeSchema.parse(said)).toEqual({
			...{ mapping, isSynthetic: true, startHour: 6.5, version: 3 }
		});
	});

	it('leave out what is left out', () => {
		const draft = toMappingDraft(MAPPING, PROPOSAL, { isSynthetic: false, startHour: null });
		const { mapping } = readMappingDraft({ ...draft, 'channel.4': '' }, ';', PROPOSAL) as {
			mapping: TraceMappingInput;
		};
		expect(mapping.columns).toEqual([MAPPING.columns[0]]);
	});

	it('hold a time of day as people write it', () => {
		expect([readHour('06:30'), readHour('6.30'), readHour(' '), writeHour(22.25)]).toEqual([
			...[6.5, 6.5, null, '22:15']
		]);
		expect([readHour('25:00'), readHour('noon')]).toEqual([NaN, NaN]);
	});
});
