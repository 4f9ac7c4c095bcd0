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

const flag = (holds: boolean | undefined): number | null => (holds === undefined ? null : holds ? 1 : 0);

/** Of one reading its square and how far off it is follow from its error; a trace is many readings, and says its own. */
function sumUp(held: CheckRow['held']): { square: number | null; misfit: number; place: string | null } {
	if ('meanSquare' in held) return { square: held.meanSquare, misfit: held.misfit, place: held.place };
	const { error, deviations } = held;
	return { square: error === null ? null : error * error, misfit: Math.abs(deviations), place: null };
}

/** What each column takes of a row. */
const COLUMNS: Record<string, (row: CheckRow) => unknown> = {
	kind: ({ kind }) => kind,
	workshop_id: ({ workshopId }) => workshopId,
	mount_id: ({ mountId }) => mountId,
	installation_id: ({ installationId }) => installationId,
	field_note_id: ({ fieldNoteId }) => fieldNoteId,
	trace_id: ({ traceId }) => traceId,
	assessment_id: ({ assessmentId }) => assessmentId,
	book_id: ({ bookId }) => bookId,
	place: ({ held }) => sumUp(held).place,
	read_on: ({ readOn }) => readOn,
	measured: ({ held }) => held.measured,
	predicted: ({ held }) => held.predicted,
	low: ({ held }) => held.low,
	high: ({ held }) => held.high,
	error: ({ held }) => held.error,
	square: ({ held }) => sumUp(held).square,
	deviations: ({ held }) => held.deviations,
	misfit: ({ held }) => sumUp(held).misfit,
	stand: ({ held }) => held.stand,
	chance: ({ watched }) => watched?.chance ?? null,
	observed_days: ({ watched }) => watched?.observedDays ?? null,
	is_looked_at: ({ watched }) => flag(watched?.isLookedAt),
	is_entered_later: ({ isEnteredLater }) => flag(isEnteredLater),
	left_out: ({ leftOut }) => leftOut
};
const NAMES = Object.keys(COLUMNS).join(', ');
const READERS = Object.values(COLUMNS);

export async function writeChecks(rows: readonly CheckRow[], transaction: Transaction): Promise<void> {
	if (rows.length === 0) return;
	await connection().query(`INSERT INTO prediction_checks (${NAMES}) VALUES :rows`, {
		replacements: { rows: rows.map((row) => READERS.map((read) => read(row))) },
		transaction
	});
}
