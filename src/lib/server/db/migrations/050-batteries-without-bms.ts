import type { Migration } from '../migrate';

/** The names of chemistries stand in the engine's own table, so the column takes any. */
export const migration: Migration = {
	name: '050-batteries-without-bms',
	up: (run) =>
		run(`
			ALTER TABLE battery_records
				MODIFY chemistry VARCHAR(40) NOT NULL,
				MODIFY sensor ENUM('cells', 'board', 'hotter') NULL,
				MODIFY charge_cut_c DOUBLE NULL,
				MODIFY charge_reset_c DOUBLE NULL,
				MODIFY discharge_cut_c DOUBLE NULL,
				MODIFY discharge_reset_c DOUBLE NULL,
				MODIFY cut_delay_s DOUBLE NULL,
				MODIFY auto_reset TINYINT(1) NULL,
				ADD COLUMN IF NOT EXISTS highest_charge_c DOUBLE NULL AFTER auto_reset,
				ADD COLUMN IF NOT EXISTS highest_use_c DOUBLE NULL AFTER highest_charge_c,
				ADD COLUMN IF NOT EXISTS rated_life_years DOUBLE NULL AFTER highest_use_c,
				ADD COLUMN IF NOT EXISTS compensates_charge TINYINT(1) NULL AFTER rated_life_years
		`)
};
