import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '008-battery-records',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS battery_records (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				maker VARCHAR(60) NOT NULL,
				model VARCHAR(60) NOT NULL,
				chemistry ENUM('lithium-iron-phosphate') NOT NULL,
				capacity_ah DOUBLE NOT NULL,
				length_mm DOUBLE NOT NULL,
				width_mm DOUBLE NOT NULL,
				height_mm DOUBLE NOT NULL,
				mass_kg DOUBLE NOT NULL,
				internal_resistance_mohm DOUBLE NOT NULL,
				max_charge_a DOUBLE NOT NULL,
				sensor ENUM('cells', 'board', 'hotter') NOT NULL,
				charge_cut_c DOUBLE NOT NULL,
				charge_reset_c DOUBLE NOT NULL,
				discharge_cut_c DOUBLE NOT NULL,
				discharge_reset_c DOUBLE NOT NULL,
				cut_delay_s DOUBLE NOT NULL,
				auto_reset TINYINT(1) NOT NULL,
				under_bonnet ENUM('allowed', 'excluded', 'conditional', 'silent') NOT NULL,
				under_bonnet_words VARCHAR(500) NOT NULL DEFAULT '',
				data_sheet VARCHAR(240) NOT NULL DEFAULT '',
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY battery_records_name (workshop_id, maker, model),
				CONSTRAINT battery_records_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
