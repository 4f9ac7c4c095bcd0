import type { Migration } from '../migrate';

/** Rows that went over to a later recommendation go back to the one under which the battery was fitted. */
export const migration: Migration = {
	name: '140-review-rows-fitted-under',
	up: (run) =>
		run(`
			UPDATE review_rows r
				JOIN installations i ON i.id = r.installation_id
			SET r.recommendation_id = (
				SELECT COALESCE(MAX(IF(n.created_at <= i.created_at, n.id, NULL)), MIN(n.id))
				FROM recommendations n WHERE n.job_id = i.job_id AND n.assessment_id = i.assessment_id)
		`)
};
