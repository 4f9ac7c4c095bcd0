import type { Transaction } from 'sequelize';
import type { LeftOut, ReadingKind } from '$lib/schemas/accuracy';
import type { Held } from '$lib/thermal/field';
import type { HeldTrace } from '$lib/thermal/fit';
import { connection } from '../../db/connection';

/** A row of prediction_checks. */
export interface CheckRow {
	kind: ReadingKind;
	workshopId: number;
	mountId: number;
	/** Null of traces: they are measured at mounts, before or after anything was fitted. */
	installationId: number | null;
	fieldNoteId: number | null;
	traceId: number | null;
	assessmentId: number;
	bookId: number;
	readOn: string;
	held: Held | HeldTrace;
	/** Of cut-outs: the stated chance of one at least, for how long it was watched, and whether anybody looked. */
	watched: { chance: number; observedDays: number; isLookedAt: boolean } | null;
	isEnteredLater: boolean;
	leftOut: LeftOut | '';
}

const COLUMNS = [
	...['kind', 'workshop_id', 'mount_id', 'installation_id', 'field_note_id', 'trace_id'],
	...['assessment_id', 'book_id', 'place'],
	...['read_on', 'measured', 'predicted', 'low', 'high', 'error', 'square', 'deviations', 'misfit', 'stand'],
	...['chance', 'observed_days', 'is_looked_at', 'is_entered_later', 'left_out']
];

const flag = (holds: boolean | undefined): number | null => (holds === undefined ? null : holds ? 1 : 0);

/** In the order of COLUMNS. */
function valuesOf({ held, watched, ...row }: CheckRow): unknown[] {
	const { measured, predicted, low, high, error, deviations, stand } = held;
	const isTrace = 'meanSquare' in held;
	const square = isTrace ? held.meanSquare : error === null ? null : error * error;
	return [
		...[row.kind, row.workshopId, row.mountId, row.installationId, row.fieldNoteId],
		...[
			row.traceId,
			row.assessmentId,
			row.bookId,
			isTrace ? held.place : null,
			row.readOn,
			measured,
			predicted,
			low,
			high,
			error,
			square,
			deviations
		],
		...[
			isTrace ? held.misfit : Math.abs(deviations),
			stand,
			watched?.chance ?? null,
			watched?.observedDays ?? null
		],
		...[flag(watched?.isLookedAt), flag(row.isEnteredLater), row.leftOut]
	];
}

export async function writeChecks(rows: readonly CheckRow[], transaction: Transaction): Promise<void> {
	if (rows.length === 0) return;
	await connection().query(`INSERT INTO prediction_checks (${COLUMNS.join(', ')}) VALUES :rows`, {
		replacements: { rows: rows.map(valuesOf) },
		transaction
	});
}
