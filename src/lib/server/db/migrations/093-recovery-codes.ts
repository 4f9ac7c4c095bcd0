import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '093-recovery-codes',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS recovery_codes (
				code_hash CHAR(64) NOT NULL PRIMARY KEY,
				person_id BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				KEY recovery_codes_by_person (person_id),
				CONSTRAINT recovery_codes_person FOREIGN KEY (person_id) REFERENCES people (id)
			)
		`)
};
