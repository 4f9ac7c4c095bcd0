import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '062-installations',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS installations (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				mount_id BIGINT UNSIGNED NOT NULL,
				assessment_id BIGINT UNSIGNED NOT NULL,
				fitted_on DATE NOT NULL,
				fitted_by VARCHAR(120) NOT NULL,
				serial_number VARCHAR(80) NOT NULL DEFAULT '',
				agreed JSON NOT NULL,
				differences JSON NOT NULL,
				note VARCHAR(1000) NOT NULL DEFAULT '',
				created_by BIGINT UNSIGNED NOT NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY installations_mount (mount_id),
				KEY installations_by_workshop (workshop_id, fitted_on, id),
				CONSTRAINT installations_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT installations_job FOREIGN KEY (job_id) REFERENCES jobs (id),
				CONSTRAINT installations_mount FOREIGN KEY (mount_id) REFERENCES mounts (id),
				CONSTRAINT installations_assessment FOREIGN KEY (assessment_id) REFERENCES assessments (id),
				CONSTRAINT installations_created_by FOREIGN KEY (created_by) REFERENCES people (id)
			)
		`)
};
