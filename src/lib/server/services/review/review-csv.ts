import { stringify } from 'csv-stringify/sync';
import { nameAgainst } from '$lib/format/recommendations';
import { formatVerdict } from '$lib/format/verdict';
import { CHANCE_WORDS, SHEET_WORDS } from '$lib/format/review-words';
import type { SignedInPerson } from '$lib/schemas/people';
import type { ReviewInstallation, ReviewListQuery } from '$lib/schemas/review';
import { safeText } from '../safe-csv';
import { walkInstallations } from './review-list';

const BATCH = 1_000;
/** Spreadsheets on Windows take a file without it for one in their own alphabet. */
const BYTE_ORDER_MARK = '\uFEFF';
const rounded = (value: number | null): number | string => (value === null ? '' : Number(value.toFixed(3)));

const COLUMNS: Record<string, (row: ReviewInstallation) => string | number> = {
	Job: ({ jobNumber }) => jobNumber,
	Customer: ({ customer }) => customer,
	Vehicle: ({ vehicle }) => vehicle,
	Position: ({ mount }) => mount,
	Place: ({ place }) => place ?? '',
	Zone: ({ zone }) => zone,
	'Fitted on': ({ fittedOn }) => fittedOn,
	Verdict: ({ verdict, chemistry }) => formatVerdict(verdict, chemistry),
	// A figure that there is not stays empty: why, stands in a column of its own.
	'Chance of going dark': ({ chance }) => CHANCE_WORDS[chance],
	'Expected dark days a year': ({ expectedDaysAYear }) => rounded(expectedDaysAYear),
	'Predicted dark days since fitted': ({ predictedDays }) => rounded(predictedDays),
	'Reported dark days': ({ reportedDays }) => reportedDays,
	'Next look due on': ({ nextDueOn }) => nextDueOn ?? '',
	'Days overdue': ({ overdueDays }) => overdueDays,
	'Went ahead against': ({ override }) => (override ? nameAgainst(override) : ''),
	'Went ahead by': ({ override }) => override?.decidedBy ?? '',
	'Entered by': ({ override }) => override?.enteredBy ?? '',
	Reason: ({ override }) => override?.reason ?? '',
	'Recommended again on': ({ later }) => later?.on ?? '',
	Sheet: ({ sheetState }) => SHEET_WORDS[sheetState],
	'Sheet sent on': ({ sheetSentOn }) => sheetSentOn ?? ''
};
const READERS = Object.values(COLUMNS);

/** A list as a table for other programs (RFC 4180), a batch at a time: however long, little of it is held at once. */
export async function* writeReviewCsv(
	person: SignedInPerson,
	query: ReviewListQuery
): AsyncGenerator<string> {
	const heads = stringify([Object.keys(COLUMNS)], { record_delimiter: 'windows' });
	let isBegun = false;
	for await (const rows of walkInstallations(person, query, BATCH)) {
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
