import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '015-assessments',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS assessments (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				mount_id BIGINT UNSIGNED NOT NULL,
				book_id BIGINT UNSIGNED NOT NULL,
				engine_version VARCHAR(20) NOT NULL,
				inputs LONGTEXT NOT NULL CHECK (JSON_VALID(inputs)),
				inputs_sha256 CHAR(64) NOT NULL,
				result LONGTEXT NOT NULL CHECK (JSON_VALID(result)),
				verdict ENUM('rides-it-out', 'runs-close', 'cuts-out') NOT NULL,
				headroom_k DOUBLE NOT NULL,
				peak_cells_c DOUBLE NOT NULL,
				peak_at_hour DOUBLE NOT NULL,
				cut_at_hour DOUBLE NULL,
				reset_at_hour DOUBLE NULL,
				dark_hours DOUBLE NOT NULL,
				charge_missed_ah DOUBLE NOT NULL,
				created_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				KEY assessments_by_mount (mount_id, id),
				KEY assessments_by_job (job_id, id),
				KEY assessments_by_workshop (workshop_id, id),
				CONSTRAINT assessments_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT assessments_job FOREIGN KEY (job_id) REFERENCES jobs (id),
				CONSTRAINT assessments_mount FOREIGN KEY (mount_id) REFERENCES mounts (id),
				CONSTRAINT assessments_book FOREIGN KEY (book_id) REFERENCES coefficient_books (id),
				CONSTRAINT assessments_created_by FOREIGN KEY (created_by) REFERENCES people (id)
			)
		`)
};
