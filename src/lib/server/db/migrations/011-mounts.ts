import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '011-mounts',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS mounts (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				letter CHAR(1) NOT NULL,
				name VARCHAR(80) NOT NULL,
				position_kind VARCHAR(30) NOT NULL,
				survey JSON NOT NULL,
				survey_complete TINYINT(1) NOT NULL DEFAULT 0,
				removed_at DATETIME(3) NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY mounts_letter (job_id, letter),
				CONSTRAINT mounts_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT mounts_job FOREIGN KEY (job_id) REFERENCES jobs (id)
			)
		`)
};
