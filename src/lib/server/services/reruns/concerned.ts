import type { Transaction } from 'sequelize';
import { closestBook, holdsFor } from '$lib/schemas/books';
import { ENGINE_LAYOUTS } from '$lib/schemas/vehicles';
import { POSITION_KINDS } from '$lib/thermal/survey';
import { connection } from '../../db/connection';
import type { CoefficientBook, Rerun } from '../../db/models';
import { listInForce } from '../books';

const PUT_IN = `
	INSERT INTO rerun_items (workshop_id, rerun_id, job_id, mount_id, assessment_id)
	SELECT a.workshop_id, :rerunId, a.job_id, a.mount_id, a.id
	FROM assessments a
		JOIN (SELECT MAX(id) AS id FROM assessments WHERE workshop_id = :workshopId GROUP BY mount_id) newest
			ON newest.id = a.id
		JOIN mounts m ON m.id = a.mount_id AND m.removed_at IS NULL
		JOIN jobs j ON j.id = a.job_id
		JOIN vehicles v ON v.id = j.vehicle_id
	WHERE (v.engine_layout, m.position_kind, a.book_id) NOT IN (:current)
		AND (v.engine_layout, m.position_kind) IN (:cases)
	ORDER BY a.id
`;

/** Puts into a re-run the newest assessment of each mount that the book is, or was, for and that another book is now closest to. */
export async function putInConcerned(
	{ id: rerunId, workshopId }: Rerun,
	book: CoefficientBook,
	transaction: Transaction
): Promise<void> {
	const inForce = await listInForce(workshopId);
	const cases = ENGINE_LAYOUTS.flatMap((engineLayout) =>
		POSITION_KINDS.map((positionKind) => ({ engineLayout, positionKind }))
	).filter((mount) => holdsFor(book, mount));
	const pairs = cases.map(({ engineLayout, positionKind }) => [engineLayout, positionKind]);
	const current = cases.map((mount) => [
		...[mount.engineLayout, mount.positionKind],
		closestBook(inForce, mount)?.id ?? 0
	]);
	await connection().query(PUT_IN, {
		replacements: { rerunId, workshopId, cases: pairs, current },
		transaction
	});
}
