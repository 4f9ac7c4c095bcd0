import { QueryTypes } from 'sequelize';
import { connection } from '../../db/connection';

/**
 * The newest assessment of a mount that was there when something was read of it: made by the day of the reading, and
 * before its note. Where none was, since an older battery was entered afterwards, the one that was agreed on stands in.
 * Of a note that is not kept yet the moment is now.
 *
 * @param note alias of the note or of what stands for it: `noted_on`, `created_at`
 * @param installation alias of the installation
 */
export const predictionAt = (note: string, installation: string): string => `COALESCE(
	(SELECT MAX(b.id) FROM assessments b WHERE b.mount_id = ${installation}.mount_id
		AND b.created_at < ${note}.created_at AND DATE(b.created_at) <= ${note}.noted_on),
	${installation}.assessment_id)`;

/** What was in force for an installation's mount on a day, for a note that is being written now. */
export async function findPredictionNow(installationId: number, notedOn: string): Promise<number> {
	const [row] = await connection().query<{ assessmentId: number }>(
		`SELECT ${predictionAt('n', 'i')} AS assessmentId
			FROM installations i, (SELECT CAST(:notedOn AS DATE) AS noted_on, CAST(:now AS DATETIME(3)) AS created_at) n
			WHERE i.id = :installationId`,
		{ replacements: { installationId, notedOn, now: new Date() }, type: QueryTypes.SELECT }
	);
	return Number(row!.assessmentId);
}
