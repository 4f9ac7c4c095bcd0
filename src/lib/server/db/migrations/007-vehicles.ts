import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '007-vehicles',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS vehicles (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				customer_id BIGINT UNSIGNED NOT NULL,
				make VARCHAR(60) NOT NULL,
				model VARCHAR(60) NOT NULL,
				model_year SMALLINT UNSIGNED NOT NULL,
				registration VARCHAR(20) NOT NULL DEFAULT '',
				engine_layout ENUM('inline', 'vee', 'flat', 'unknown') NOT NULL DEFAULT 'unknown',
				mass_kg DOUBLE NOT NULL,
				drag_area_m2 DOUBLE NOT NULL,
				tow_mass_kg DOUBLE NOT NULL DEFAULT 0,
				tow_drag_area_m2 DOUBLE NOT NULL DEFAULT 0,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				KEY vehicles_by_customer (workshop_id, customer_id),
				CONSTRAINT vehicles_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT vehicles_customer FOREIGN KEY (customer_id) REFERENCES customers (id)
			)
		`)
};
