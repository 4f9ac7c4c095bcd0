import { QueryTypes, type Transaction } from 'sequelize';
import type { FieldNoteInput } from '$lib/schemas/field-notes';
import { holdLabel, spreadPeak, type Held } from '$lib/thermal/field';
import { connection } from '../../db/connection';
import { Assessment, type FieldNote, type Installation } from '../../db/models';
import { today } from '../days';
import { labelOf, scenarioOn } from '../field-readings';
import { isUnstruck } from '../field-standing';
import { findingBy } from '../judged-notes';
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

/**
 * What was struck out does not count. Whoever notes the same place on the same day once more puts the earlier reading
 * right, unless that was struck out itself.
 */
const SETTLE = `
	UPDATE prediction_checks c JOIN field_notes n ON n.id = c.field_note_id
		JOIN installations i ON i.id = n.installation_id
	SET c.left_out = CASE
		WHEN NOT ${isUnstruck('n')} THEN 'struck'
		WHEN EXISTS (SELECT 1 FROM field_notes later
			WHERE later.installation_id = n.installation_id AND later.kind = n.kind AND later.noted_on = n.noted_on
				AND later.id > n.id AND JSON_VALUE(later.data, '$.place') = JSON_VALUE(n.data, '$.place')
				AND ${isUnstruck('later')}) THEN 'noted-again'
		WHEN JSON_EXTRACT(${findingBy('n', 'i')}, '$.learning.fits') = 'false' THEN 'fits-nothing'
		ELSE '' END
	WHERE c.installation_id = :installationId AND c.kind = 'label'
`;

/** Says anew which labels of an installation count, inside the transaction that added or struck one. */
export async function settleLabels(installationId: number, transaction: Transaction): Promise<void> {
	const replacements = { installationId };
	await connection().query(SETTLE, { replacements, type: QueryTypes.UPDATE, transaction });
}

/** Keeps what a label says of the prediction, inside the transaction that keeps its note. */
export async function keepLabelCheck(
	{ id: noteId, workshopId, installationId, notedOn }: FieldNote,
	mountId: number,
	{ assessmentId, bookId, isEnteredLater, held }: LabelCheck,
	transaction: Transaction
): Promise<void> {
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
		[{ kind: 'label', ...about, readOn: notedOn, held, watched: null, isEnteredLater, leftOut: '' }],
		transaction
	);
	await settleLabels(installationId, transaction);
}
