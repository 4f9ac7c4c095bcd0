/** What was held against a prediction, with what it is told apart by; of a mount that was taken away nothing counts. */
export const CHECKS = `prediction_checks c
	JOIN mounts m ON m.id = c.mount_id AND m.removed_at IS NULL
	JOIN jobs j ON j.id = m.job_id
	LEFT JOIN places p ON p.id = j.place_id
	JOIN coefficient_books b ON b.id = c.book_id`;

export const ZONE = "COALESCE(p.computed_zone, p.climate_zone, '')";
