import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '021-audit-heads',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS audit_heads (
				workshop_id BIGINT UNSIGNED NOT NULL PRIMARY KEY,
				sequence INT UNSIGNED NOT NULL,
				hash CHAR(64) NOT NULL,
				CONSTRAINT audit_heads_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
