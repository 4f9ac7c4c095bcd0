import type { Migration } from '../migrate';

/** Sessions are cleared after a month; when somebody was last in is kept with the person. */
export const migration: Migration = {
	name: '091-people-seen',
	up: (run) =>
		run(`
			ALTER TABLE people
				ADD COLUMN IF NOT EXISTS last_signed_in_at DATETIME(3) NULL AFTER active,
				ADD COLUMN IF NOT EXISTS left_at DATETIME(3) NULL AFTER last_signed_in_at
		`)
};
