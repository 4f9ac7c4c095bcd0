/** What was held against a prediction, with what it is told apart by; of a mount that was taken away nothing counts. */
export const CHECKS = `prediction_checks c
	JOIN mounts m ON m.id = c.mount_id AND m.removed_at IS NULL
	JOIN jobs j ON j.id = m.job_id
	LEFT JOIN places p ON p.id = j.place_id
	JOIN coefficient_books b ON b.id = c.book_id`;

/** Traces that were measured and read at mounts that stand, and that nothing was held against. */
export const UNHELD_TRACES = `traces t
	JOIN mounts m ON m.id = t.mount_id AND m.removed_at IS NULL
	LEFT JOIN prediction_checks c ON c.trace_id = t.id
	WHERE t.state = 'read' AND NOT t.is_synthetic AND t.removed_at IS NULL AND c.id IS NULL`;

/** Of those, the ones that somebody has asked to have held. */
export const WAITS = 'EXISTS (SELECT 1 FROM traces_to_hold a WHERE a.trace_id = t.id)';

export const ZONE = "COALESCE(p.computed_zone, p.climate_zone, '')";
