import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '031-places-months',
	up: (run) =>
		run(`
			ALTER TABLE places
				ADD COLUMN IF NOT EXISTS monthly_max_c JSON NULL AFTER source,
				ADD COLUMN IF NOT EXISTS monthly_spread_k JSON NULL AFTER monthly_max_c,
				ADD COLUMN IF NOT EXISTS months_source VARCHAR(300) NULL AFTER monthly_spread_k
		`)
};
