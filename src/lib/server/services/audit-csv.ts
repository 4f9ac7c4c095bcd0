import { stringify } from 'csv-stringify/sync';
import type { AuditQuery, AuditRow } from '$lib/schemas/audit';
import type { SignedInPerson } from '$lib/schemas/people';
import { readAudit } from './audit-list';
import { safeText } from './safe-csv';

const HEADINGS = ['number', 'at (UTC)', 'who', 'action', 'in words', 'subject', 'subject number', 'recorded'];

const sayDetail = ({ detail }: AuditRow): string =>
	detail.map(({ label, value }) => `${label}: ${value}`).join('; ');

const rowOf = (row: AuditRow): (string | number)[] => [
	...[row.sequence, row.at, safeText(row.who), safeText(row.action), safeText(row.did)],
	...[safeText(row.subject), row.subjectNumber, safeText(sayDetail(row))]
];

/** The trail as a table, written while it is read. */
export async function* writeAuditCsv(person: SignedInPerson, query: AuditQuery): AsyncGenerator<string> {
	yield stringify([HEADINGS]);
	for await (const rows of readAudit(person, query)) yield stringify(rows.map(rowOf));
}
