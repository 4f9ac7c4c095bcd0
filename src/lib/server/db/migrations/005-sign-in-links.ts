import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '005-sign-in-links',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS sign_in_links (
				token_hash CHAR(64) NOT NULL PRIMARY KEY,
				person_id BIGINT UNSIGNED NOT NULL,
				expires_at DATETIME(3) NOT NULL,
				created_at DATETIME(3) NOT NULL,
				KEY sign_in_links_by_person (person_id),
				CONSTRAINT sign_in_links_person FOREIGN KEY (person_id) REFERENCES people (id)
			)
		`)
};
