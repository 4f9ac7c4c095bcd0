import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '020-audit-entries',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS audit_entries (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				sequence INT UNSIGNED NOT NULL,
				at DATETIME(3) NOT NULL,
				person_id BIGINT UNSIGNED NULL,
				action VARCHAR(60) NOT NULL,
				subject_type VARCHAR(30) NOT NULL,
				subject_id BIGINT UNSIGNED NOT NULL,
				detail LONGTEXT NOT NULL CHECK (JSON_VALID(detail)),
				previous_hash CHAR(64) NOT NULL,
				hash CHAR(64) NOT NULL,
				UNIQUE KEY audit_entries_sequence (workshop_id, sequence),
				KEY audit_entries_by_subject (workshop_id, subject_type, subject_id, sequence),
				CONSTRAINT audit_entries_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
