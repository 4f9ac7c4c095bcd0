import type { Migration } from '../migrate';

/** Of a place: what its climate class is computed from, that class, and which zone of the shop's own it falls into (0: none). */
export const migration: Migration = {
	name: '080-places-class',
	up: (run) =>
		run(`
			ALTER TABLE places
				ADD COLUMN IF NOT EXISTS monthly_mean_c JSON NULL,
				ADD COLUMN IF NOT EXISTS monthly_rain_mm JSON NULL,
				ADD COLUMN IF NOT EXISTS class_source VARCHAR(300) NULL,
				ADD COLUMN IF NOT EXISTS computed_zone VARCHAR(3) NULL,
				ADD COLUMN IF NOT EXISTS own_zone_id BIGINT UNSIGNED NOT NULL DEFAULT 0
		`)
};
