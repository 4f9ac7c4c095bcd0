import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '010-jobs',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS jobs (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				number INT UNSIGNED NOT NULL,
				customer_id BIGINT UNSIGNED NOT NULL,
				vehicle_id BIGINT UNSIGNED NOT NULL,
				battery_record_id BIGINT UNSIGNED NULL,
				place_id BIGINT UNSIGNED NULL,
				hot_day_max_c DOUBLE NULL,
				daily_range_k DOUBLE NULL,
				sun_peak_w_per_m2 DOUBLE NULL,
				stage ENUM('survey', 'assessed', 'recommended', 'sent', 'acknowledged') NOT NULL DEFAULT 'survey',
				verdict ENUM('rides-it-out', 'runs-close', 'cuts-out') NULL,
				headroom_k DOUBLE NULL,
				note VARCHAR(1000) NOT NULL DEFAULT '',
				created_by BIGINT UNSIGNED NOT NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY jobs_number (workshop_id, number),
				KEY jobs_by_update (workshop_id, updated_at, id),
				KEY jobs_by_verdict (workshop_id, verdict, updated_at, id),
				KEY jobs_by_stage (workshop_id, stage, updated_at, id),
				KEY jobs_by_headroom (workshop_id, headroom_k, id),
				CONSTRAINT jobs_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT jobs_customer FOREIGN KEY (customer_id) REFERENCES customers (id),
				CONSTRAINT jobs_vehicle FOREIGN KEY (vehicle_id) REFERENCES vehicles (id),
				CONSTRAINT jobs_battery FOREIGN KEY (battery_record_id) REFERENCES battery_records (id),
				CONSTRAINT jobs_place FOREIGN KEY (place_id) REFERENCES places (id),
				CONSTRAINT jobs_created_by FOREIGN KEY (created_by) REFERENCES people (id)
			)
		`)
};
