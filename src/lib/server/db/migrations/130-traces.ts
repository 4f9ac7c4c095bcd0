import type { Migration } from '../migrate';

/** What loggers measured at mounts: how each file is read, what became of it, its legs. The figures are in the storage. */
export const migration: Migration = {
	name: '130-traces',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS traces (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				mount_id BIGINT UNSIGNED NOT NULL,
				name VARCHAR(120) NOT NULL,
				is_synthetic BOOLEAN NOT NULL DEFAULT FALSE,
				state ENUM('described', 'reading', 'read', 'failed') NOT NULL,
				bytes INT UNSIGNED NOT NULL,
				sha256 CHAR(64) CHARACTER SET ascii NOT NULL,
				content_id CHAR(32) CHARACTER SET ascii NOT NULL,
				fingerprint CHAR(16) CHARACTER SET ascii NOT NULL,
				proposal JSON NOT NULL,
				mapping JSON NOT NULL,
				failure JSON NULL,
				report JSON NULL,
				span JSON NULL,
				start_hour DOUBLE NULL,
				legs JSON NOT NULL,
				legs_by BIGINT UNSIGNED NULL,
				uploaded_by BIGINT UNSIGNED NOT NULL,
				mapped_by BIGINT UNSIGNED NULL,
				read_at DATETIME(3) NULL,
				removed_at DATETIME(3) NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY traces_content (content_id),
				KEY traces_by_mount (mount_id, removed_at, id),
				KEY traces_by_workshop (workshop_id, removed_at, id),
				KEY traces_removed (removed_at),
				CONSTRAINT traces_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT traces_job FOREIGN KEY (job_id) REFERENCES jobs (id),
				CONSTRAINT traces_mount FOREIGN KEY (mount_id) REFERENCES mounts (id),
				CONSTRAINT traces_legs_by FOREIGN KEY (legs_by) REFERENCES people (id),
				CONSTRAINT traces_uploaded_by FOREIGN KEY (uploaded_by) REFERENCES people (id),
				CONSTRAINT traces_mapped_by FOREIGN KEY (mapped_by) REFERENCES people (id)
			)
		`)
};
