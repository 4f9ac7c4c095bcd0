import { describe, expect, it } from 'vitest';
import type { TraceProposalView } from '../schemas/traces';
import type { MappingDraft } from './trace-mapping-form';
import { listMappingProblems } from './trace-mapping-problems';

const PROPOSAL: TraceProposalView = {
	...{ headerLine: 1, firstRowLine: 2, firstRows: [], timeWhy: '', notes: [], knownSince: null },
	columns: ['Clock', 'Cell', 'Amps'].map((name, at) => ({ number: at + 1, name }))
};
const BOXES: MappingDraft = {
	...{ timeKind: 'calendar', timeColumn: '1', clockColumn: '', timeZone: 'UTC', firstDay: '', startHour: '' },
	...{ 'channel.2': 'cellC', 'unit.2': '°C', 'channel.3': 'currentA', 'unit.3': 'A' }
};
const refused = (changes: MappingDraft) => listMappingProblems({ ...BOXES, ...changes }, PROPOSAL);

describe('what cannot be of the columns of a file', () => {
	it('is nothing where all of it goes together', () => {
		expect(refused({})).toEqual([]);
		expect(refused({ startHour: '6.30' })).toEqual([]);
		// What concerns another way to tell the time is not looked at.
		expect(refused({ timeKind: 'elapsed-s', timeZone: 'Nowhere', firstDay: 'x' })).toEqual([]);
	});

	it.each<[string, MappingDraft, string, string]>([
		[
			'a unit of something else',
			{ 'unit.2': 'A' },
			'unit.2',
			'Column 2 is Cells: that is measured in °C or °F, not in A.'
		],
		[
			'one thing in two columns',
			{ 'channel.3': 'cellC', 'unit.3': '°C' },
			'channel.3',
			'Column 3 is Cells, and so is column 2: choose one of them, and leave the other out.'
		],
		[
			'nothing measured',
			{ 'channel.2': '', 'channel.3': '' },
			'channel.2',
			'Say of at least one column what it measures.'
		],
		[
			'the time of day in the date’s column',
			{ clockColumn: '1' },
			'clockColumn',
			'The time of day has a column of its own: column 1 has the date already. Choose “No”, or another column.'
		],
		[
			'the time in a column that measures',
			{ timeColumn: '2' },
			'timeColumn',
			'Column 2 tells the time, and is said to be Cells, too: choose another column, or leave that out.'
		],
		[
			'a zone that is none',
			{ timeZone: 'Nowhere/Else' },
			'timeZone',
			'Time zone of the logger’s clock: there is none called “Nowhere/Else”. Write its IANA name, such as Australia/Darwin.'
		],
		[
			'no zone where it was driven',
			{ timeKind: 'epoch-s', timeZone: '' },
			'timeZone',
			'Time zone where it was driven: it is empty. Write its IANA name, such as Australia/Darwin.'
		],
		[
			'a day that never was',
			{ timeKind: 'time-of-day', firstDay: '2026-02-30' },
			'firstDay',
			'Date of the first row: “2026-02-30” is no date. Write it such as 2026-02-03, or leave it empty.'
		],
		[
			'an hour that is none',
			{ startHour: 'noon' },
			'startHour',
			'Time of day at the start: “noon” is no time of day. Write it such as 06:30, or leave it empty.'
		]
	])('%s is told at its box, by its label', (_what, changes, path, message) => {
		expect(refused(changes)).toEqual([{ path, message }]);
	});

	it('is told all at once', () => {
		const paths = refused({ 'unit.2': 'A', timeZone: 'x', startHour: 'y' }).map(({ path }) => path);
		expect(paths).toEqual(['unit.2', 'timeZone', 'startHour']);
	});
});
