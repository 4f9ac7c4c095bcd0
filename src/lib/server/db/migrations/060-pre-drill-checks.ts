import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '060-pre-drill-checks',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS pre_drill_checks (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				mount_id BIGINT UNSIGNED NOT NULL,
				answers JSON NOT NULL,
				signed_by VARCHAR(120) NULL,
				signed_at DATETIME(3) NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY pre_drill_checks_mount (mount_id),
				CONSTRAINT pre_drill_checks_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT pre_drill_checks_mount FOREIGN KEY (mount_id) REFERENCES mounts (id)
			)
		`)
};
