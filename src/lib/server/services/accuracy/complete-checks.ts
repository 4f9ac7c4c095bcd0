import { QueryTypes } from 'sequelize';
import { connection } from '../../db/connection';
import { FieldNote, Installation } from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { isUnstruck } from '../field-standing';
import { refreshChecks } from './keep-checks';
import { holdNote, keepLabelCheck } from './label-checks';
import { predictionAt } from './prediction-at';
import { askToHold } from './ask-to-hold';
import { finishHolding } from './hold-waiting';

const BATCH = 500;

/** Labels from before they were held against anything. */
const LABELS = `
	SELECT n.id, i.mount_id AS mountId, i.id AS installationId, ${predictionAt('n', 'i')} AS assessmentId
	FROM field_notes n
		JOIN installations i ON i.id = n.installation_id
		LEFT JOIN prediction_checks c ON c.field_note_id = n.id
	WHERE n.kind = 'peak-label' AND c.id IS NULL ORDER BY n.id
`;

/** Installations with an outlook of which something is known, and nothing was held against it. */
const INSTALLATIONS = `
	SELECT i.id FROM installations i
		JOIN mounts m ON m.id = i.mount_id AND m.removed_at IS NULL
		JOIN assessment_outlooks o ON o.assessment_id = i.assessment_id
		LEFT JOIN prediction_checks c ON c.installation_id = i.id AND c.kind IN ('cut-out', 'capacity')
	WHERE c.id IS NULL AND (
		EXISTS (SELECT 1 FROM follow_ups f WHERE f.installation_id = i.id AND f.done_on > i.fitted_on)
		OR EXISTS (SELECT 1 FROM field_notes n WHERE n.installation_id = i.id AND n.noted_on > i.fitted_on
			AND ${isUnstruck('n')}))
	ORDER BY i.id
`;

const select = <Row extends object>(sql: string): Promise<Row[]> =>
	connection().query<Row>(sql, { type: QueryTypes.SELECT });

async function isHeld(noteId: number): Promise<boolean> {
	const [row] = await connection().query<{ held: number }>(
		'SELECT COUNT(*) AS held FROM prediction_checks WHERE field_note_id = :noteId',
		{ replacements: { noteId }, type: QueryTypes.SELECT }
	);
	return Number(row?.held) > 0;
}

async function completeLabels(): Promise<number> {
	const missing = await select<{
		id: number;
		mountId: number;
		installationId: number;
		assessmentId: number;
	}>(LABELS);
	for (const { id, mountId, installationId, assessmentId } of missing) {
		const note = await FieldNote.findByPk(id);
		const check = await holdNote(assessmentId, note!.data, installationId);
		if (!check) continue;
		await inTransaction(async (transaction) => {
			// Of several processes that start together one is enough.
			await Installation.findByPk(installationId, { transaction, lock: transaction.LOCK.UPDATE });
			if (!(await isHeld(id))) await keepLabelCheck(note!, mountId, check, transaction);
		});
	}
	return missing.length;
}

/** Holds against its prediction what was noted before this was done; says how many labels, installations and traces. */
export async function completeChecks(): Promise<{ labels: number; installations: number; traces: number }> {
	const ids = (await select<{ id: number }>(INSTALLATIONS)).map(({ id }) => id);
	for (let from = 0; from < ids.length; from += BATCH) {
		const batch = ids.slice(from, from + BATCH);
		await inTransaction((transaction) => refreshChecks(batch, transaction));
	}
	await inTransaction((transaction) => askToHold('all', 0, transaction));
	return { labels: await completeLabels(), installations: ids.length, traces: await finishHolding() };
}
