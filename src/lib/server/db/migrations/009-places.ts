import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '009-places',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS places (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				name VARCHAR(80) NOT NULL,
				region VARCHAR(80) NOT NULL DEFAULT '',
				latitude_deg DOUBLE NOT NULL,
				longitude_deg DOUBLE NOT NULL,
				altitude_m DOUBLE NOT NULL,
				climate_zone VARCHAR(3) NOT NULL,
				hot_day_max_c DOUBLE NOT NULL,
				daily_range_k DOUBLE NOT NULL,
				sun_peak_w_per_m2 DOUBLE NOT NULL,
				source VARCHAR(300) NOT NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY places_name (workshop_id, name, region),
				KEY places_by_zone (workshop_id, climate_zone, name),
				CONSTRAINT places_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
