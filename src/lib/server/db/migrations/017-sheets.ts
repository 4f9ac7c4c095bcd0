import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '017-sheets',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS sheets (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				recommendation_id BIGINT UNSIGNED NOT NULL,
				token_hash CHAR(64) NOT NULL,
				text_version VARCHAR(20) NOT NULL,
				content LONGTEXT NOT NULL CHECK (JSON_VALID(content)),
				content_sha256 CHAR(64) NOT NULL,
				sent_to VARCHAR(254) NOT NULL DEFAULT '',
				first_opened_at DATETIME(3) NULL,
				withdrawn_at DATETIME(3) NULL,
				withdrawn_by BIGINT UNSIGNED NULL,
				created_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				UNIQUE KEY sheets_token (token_hash),
				KEY sheets_by_job (job_id, id),
				CONSTRAINT sheets_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT sheets_job FOREIGN KEY (job_id) REFERENCES jobs (id),
				CONSTRAINT sheets_recommendation FOREIGN KEY (recommendation_id) REFERENCES recommendations (id),
				CONSTRAINT sheets_created_by FOREIGN KEY (created_by) REFERENCES people (id)
			)
		`)
};
