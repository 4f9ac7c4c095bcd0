import { QueryTypes, type Transaction } from 'sequelize';
import type { FieldNoteInput } from '$lib/schemas/field-notes';
import { holdLabel, spreadPeak, type Held } from '$lib/thermal/field';
import { connection } from '../../db/connection';
import { Assessment, type FieldNote, type Installation } from '../../db/models';
import { today } from '../days';
import { labelOf, scenarioOn } from '../field-readings';
import { afterOthers, workInSlices } from '../slices';
import { writeChecks } from './check-rows';
import { findPredictionNow } from './prediction-at';

const DRAWS = 256;

/** A label with what was predicted of it at the time. */
export interface LabelCheck {
	assessmentId: number;
	bookId: number;
	isEnteredLater: boolean;
	held: Held;
}

/** Holds a label against an assessment, which takes part of a second; null of other notes, and where no run ends. */
export async function holdNote(
	assessmentId: number,
	data: FieldNoteInput,
	seed: number
): Promise<LabelCheck | null> {
	if (data.kind !== 'peak-label') return null;
	const assessment = await Assessment.findByPk(assessmentId);
	const { bookId, createdAt } = assessment!;
	const scenario = scenarioOn(assessment!, data.hottestDayC);
	const spread = await afterOthers(() =>
		workInSlices(spreadPeak(scenario, data.place, { samples: DRAWS, seed }))
	);
	if (!spread) return null;
	const isEnteredLater = today(createdAt) > data.notedOn;
	return { assessmentId, bookId, isEnteredLater, held: holdLabel(labelOf(data), spread) };
}

/** The same for a note that is about to be written. */
export async function checkLabel({ id }: Installation, data: FieldNoteInput): Promise<LabelCheck | null> {
	if (data.kind !== 'peak-label') return null;
	return holdNote(await findPredictionNow(id, data.notedOn), data, id);
}

/** Whoever notes the same place on the same day once more puts the earlier reading right: notes cannot be changed. */
const NOTED_AGAIN = `
	UPDATE prediction_checks c JOIN field_notes n ON n.id = c.field_note_id
	SET c.left_out = 'noted-again'
	WHERE c.installation_id = :installationId AND c.kind = 'label' AND c.read_on = :notedOn
		AND c.field_note_id < :noteId AND JSON_VALUE(n.data, '$.place') = :place
`;

/** Keeps what a label says of the prediction, inside the transaction that keeps its note. */
export async function keepLabelCheck(
	{ id: noteId, workshopId, installationId, notedOn, data, finding }: FieldNote,
	mountId: number,
	{ assessmentId, bookId, isEnteredLater, held }: LabelCheck,
	transaction: Transaction
): Promise<void> {
	const leftOut = finding?.learning?.fits === false ? 'fits-nothing' : '';
	const about = {
		workshopId,
		mountId,
		installationId,
		fieldNoteId: noteId,
		traceId: null,
		assessmentId,
		bookId
	};
	await writeChecks(
		[{ kind: 'label', ...about, readOn: notedOn, held, watched: null, isEnteredLater, leftOut }],
		transaction
	);
	const place = data.kind === 'peak-label' ? data.place : '';
	await connection().query(NOTED_AGAIN, {
		replacements: { installationId, notedOn, noteId, place },
		type: QueryTypes.UPDATE,
		transaction
	});
}
