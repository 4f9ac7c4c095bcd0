import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '043-remedy-lists',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS remedy_lists (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				money_per_hour DOUBLE NOT NULL,
				offers JSON NOT NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY remedy_lists_one_each (workshop_id),
				CONSTRAINT remedy_lists_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
