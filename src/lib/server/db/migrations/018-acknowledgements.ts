import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '018-acknowledgements',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS acknowledgements (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				sheet_id BIGINT UNSIGNED NOT NULL,
				name VARCHAR(120) NOT NULL,
				text_version VARCHAR(20) NOT NULL,
				content_sha256 CHAR(64) NOT NULL,
				created_at DATETIME(3) NOT NULL,
				UNIQUE KEY acknowledgements_sheet (sheet_id),
				CONSTRAINT acknowledgements_sheet FOREIGN KEY (sheet_id) REFERENCES sheets (id)
			)
		`)
};
