import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '002-customers',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS customers (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				name VARCHAR(120) NOT NULL,
				email VARCHAR(254) NOT NULL DEFAULT '',
				phone VARCHAR(40) NOT NULL DEFAULT '',
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				KEY customers_by_name (workshop_id, name, id),
				CONSTRAINT customers_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
