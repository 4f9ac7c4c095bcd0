import type { Migration } from '../migrate';

/** Fittings from before are held against the newest recommendation of their assessment that was there by then. */
export const migration: Migration = {
	name: '186-installations-recommendation-known',
	up: (run) =>
		run(`
			UPDATE installations i SET i.recommendation_id = (
				SELECT COALESCE(MAX(IF(n.created_at <= i.created_at, n.id, NULL)), MIN(n.id))
				FROM recommendations n WHERE n.job_id = i.job_id AND n.assessment_id = i.assessment_id)
			WHERE i.recommendation_id IS NULL
		`)
};
