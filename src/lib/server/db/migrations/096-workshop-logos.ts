import type { Migration } from '../migrate';

/** Logos stay when a newer one comes: pages that were sent show the one of their day. */
export const migration: Migration = {
	name: '096-workshop-logos',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS workshop_logos (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				sha256 CHAR(64) NOT NULL,
				width_px SMALLINT UNSIGNED NOT NULL,
				height_px SMALLINT UNSIGNED NOT NULL,
				png MEDIUMBLOB NOT NULL,
				created_at DATETIME(3) NOT NULL,
				UNIQUE KEY workshop_logos_once (workshop_id, sha256),
				CONSTRAINT workshop_logos_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
