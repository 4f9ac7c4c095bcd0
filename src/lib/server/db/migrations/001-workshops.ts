import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '001-workshops',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS workshops (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				name VARCHAR(120) NOT NULL,
				address VARCHAR(240) NOT NULL DEFAULT '',
				phone VARCHAR(40) NOT NULL DEFAULT '',
				email VARCHAR(254) NOT NULL DEFAULT '',
				next_job_number INT UNSIGNED NOT NULL DEFAULT 1,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL
			)
		`)
};
