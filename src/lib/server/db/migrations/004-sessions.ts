import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '004-sessions',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS sessions (
				id CHAR(64) NOT NULL PRIMARY KEY,
				person_id BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				last_seen_at DATETIME(3) NOT NULL,
				revoked_at DATETIME(3) NULL,
				KEY sessions_by_person (person_id),
				CONSTRAINT sessions_person FOREIGN KEY (person_id) REFERENCES people (id)
			)
		`)
};
