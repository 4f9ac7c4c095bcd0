import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '040-assessment-outlooks',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS assessment_outlooks (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				assessment_id BIGINT UNSIGNED NOT NULL,
				engine_version VARCHAR(20) NOT NULL,
				request LONGTEXT NOT NULL CHECK (JSON_VALID(request)),
				outlook LONGTEXT NOT NULL CHECK (JSON_VALID(outlook)),
				created_at DATETIME(3) NOT NULL,
				UNIQUE KEY assessment_outlooks_one_each (assessment_id),
				CONSTRAINT assessment_outlooks_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT assessment_outlooks_assessment FOREIGN KEY (assessment_id) REFERENCES assessments (id)
			)
		`)
};
