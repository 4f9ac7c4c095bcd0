import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '070-stored-files',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS stored_files (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				mount_id BIGINT UNSIGNED NOT NULL,
				kind VARCHAR(20) NOT NULL,
				question_key VARCHAR(40) NULL,
				field_note_id BIGINT UNSIGNED NULL,
				picture_of BIGINT UNSIGNED NULL,
				caption VARCHAR(200) NOT NULL DEFAULT '',
				name VARCHAR(120) NOT NULL,
				width_px INT UNSIGNED NULL,
				height_px INT UNSIGNED NULL,
				bytes INT UNSIGNED NOT NULL,
				sha256 CHAR(64) CHARACTER SET ascii NOT NULL,
				content_id CHAR(32) CHARACTER SET ascii NOT NULL,
				uploaded_by BIGINT UNSIGNED NOT NULL,
				removed_at DATETIME(3) NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY stored_files_picture (picture_of),
				UNIQUE KEY stored_files_content (content_id),
				KEY stored_files_by_mount (mount_id, removed_at, id),
				KEY stored_files_removed (removed_at),
				CONSTRAINT stored_files_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT stored_files_job FOREIGN KEY (job_id) REFERENCES jobs (id),
				CONSTRAINT stored_files_mount FOREIGN KEY (mount_id) REFERENCES mounts (id),
				CONSTRAINT stored_files_note FOREIGN KEY (field_note_id) REFERENCES field_notes (id),
				CONSTRAINT stored_files_picture_of FOREIGN KEY (picture_of) REFERENCES mounts (id),
				CONSTRAINT stored_files_uploaded_by FOREIGN KEY (uploaded_by) REFERENCES people (id)
			)
		`)
};
