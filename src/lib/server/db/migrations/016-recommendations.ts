import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '016-recommendations',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS recommendations (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				assessment_id BIGINT UNSIGNED NOT NULL,
				against_verdict TINYINT(1) NOT NULL,
				decided_by VARCHAR(120) NULL,
				reason VARCHAR(1000) NULL,
				created_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				KEY recommendations_by_job (job_id, id),
				CONSTRAINT recommendations_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT recommendations_job FOREIGN KEY (job_id) REFERENCES jobs (id),
				CONSTRAINT recommendations_assessment FOREIGN KEY (assessment_id) REFERENCES assessments (id),
				CONSTRAINT recommendations_created_by FOREIGN KEY (created_by) REFERENCES people (id),
				CONSTRAINT recommendations_reasoned CHECK (against_verdict = 0 OR (COALESCE(LENGTH(decided_by), 0) > 0 AND COALESCE(LENGTH(reason), 0) > 0))
			)
		`)
};
