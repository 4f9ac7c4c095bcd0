import { stringify } from 'csv-stringify/sync';
import { KIND_UNITS, KIND_WORDS, LEFT_OUT_WORDS } from '$lib/format/accuracy-words';
import type { Reading, ReadingsQuery } from '$lib/schemas/accuracy';
import type { SignedInPerson } from '$lib/schemas/people';
import { POSITION_LABELS } from '$lib/thermal/survey';
import { safeText } from '../safe-csv';
import { walkReadings } from './list-readings';

const BATCH = 1_000;
/** Spreadsheets on Windows take a file without it for one in their own alphabet. */
const BYTE_ORDER_MARK = '\uFEFF';

/** Shares of the capacity go out as per cent, as their unit says. */
const figure = ({ kind }: Reading, value: number | null): number | string =>
	value === null ? '' : Number((kind === 'capacity' ? value * 100 : value).toFixed(3));

const COLUMNS: Record<string, (row: Reading) => string | number> = {
	Kind: ({ kind }) => KIND_WORDS[kind],
	'Read on': ({ readOn }) => readOn,
	Job: ({ jobNumber }) => jobNumber,
	Position: ({ mount }) => mount,
	'Kind of position': ({ position }) => POSITION_LABELS[position],
	Zone: ({ zone }) => zone,
	Book: ({ book }) => book,
	Assessment: ({ assessmentId }) => assessmentId,
	Unit: ({ kind }) => KIND_UNITS[kind],
	'Label turned (°C)': ({ label }) => label?.turnedC ?? '',
	'Label not turned (°C)': ({ label }) => label?.notTurnedC ?? '',
	Measured: (row) => figure(row, row.measured),
	Predicted: (row) => figure(row, row.predicted),
	'Band from': (row) => figure(row, row.low),
	'Band to': (row) => figure(row, row.high),
	Error: (row) => figure(row, row.error),
	'Standard deviations': ({ deviations }) => Number(deviations.toFixed(3)),
	'In the band': ({ stand }) => stand,
	'Stated chance of a cut-out': ({ chance }) => (chance === null ? '' : Number(chance.toFixed(4))),
	'Days observed': ({ observedDays }) => observedDays ?? '',
	'Assessment entered later': ({ isEnteredLater }) => (isEnteredLater ? 'yes' : 'no'),
	'Left out': ({ leftOut }) => (leftOut === null ? '' : LEFT_OUT_WORDS[leftOut])
};
const READERS = Object.values(COLUMNS);

/** The readings as a table for other programs (RFC 4180), a batch at a time. */
export async function* writeAccuracyCsv(
	person: SignedInPerson,
	query: ReadingsQuery
): AsyncGenerator<string> {
	const heads = stringify([Object.keys(COLUMNS)], { record_delimiter: 'windows' });
	let isBegun = false;
	for await (const rows of walkReadings(person, query, BATCH)) {
		const cells = rows.map((row) =>
			READERS.map((read) => {
				const value = read(row);
				return typeof value === 'string' ? safeText(value) : value;
			})
		);
		const body = stringify(cells, { record_delimiter: 'windows' });
		yield isBegun ? body : `${BYTE_ORDER_MARK}${heads}${body}`;
		isBegun = true;
	}
}
