import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '099-audit-checks',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS audit_checks (
				workshop_id BIGINT UNSIGNED NOT NULL PRIMARY KEY,
				checked_at DATETIME(3) NOT NULL,
				entries INT UNSIGNED NOT NULL,
				head_hash CHAR(64) NOT NULL,
				finding VARCHAR(200) NULL,
				CONSTRAINT audit_checks_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
