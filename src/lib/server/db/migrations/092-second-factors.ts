import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '092-second-factors',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS second_factors (
				person_id BIGINT UNSIGNED NOT NULL PRIMARY KEY,
				locked_key VARCHAR(255) NOT NULL,
				confirmed_at DATETIME(3) NULL,
				last_step BIGINT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				CONSTRAINT second_factors_person FOREIGN KEY (person_id) REFERENCES people (id)
			)
		`)
};
