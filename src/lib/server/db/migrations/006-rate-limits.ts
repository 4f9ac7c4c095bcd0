import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '006-rate-limits',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS rate_limits (
				bucket VARCHAR(160) NOT NULL PRIMARY KEY,
				points INT UNSIGNED NOT NULL,
				window_ends_at DATETIME(3) NOT NULL
			)
		`)
};
