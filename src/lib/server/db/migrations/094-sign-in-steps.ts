import type { Migration } from '../migrate';

/** Somebody whose password or link was right and whose second factor is still asked for. */
export const migration: Migration = {
	name: '094-sign-in-steps',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS sign_in_steps (
				token_hash CHAR(64) NOT NULL PRIMARY KEY,
				person_id BIGINT UNSIGNED NOT NULL,
				expires_at DATETIME(3) NOT NULL,
				created_at DATETIME(3) NOT NULL,
				KEY sign_in_steps_by_person (person_id),
				CONSTRAINT sign_in_steps_person FOREIGN KEY (person_id) REFERENCES people (id)
			)
		`)
};
