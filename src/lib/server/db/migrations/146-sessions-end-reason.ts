import type { Migration } from '../migrate';

/** Why a session was ended by somebody else: what its owner reads on the sign-in page. */
export const migration: Migration = {
	name: '146-sessions-end-reason',
	up: (run) =>
		run(`
			ALTER TABLE sessions
				ADD COLUMN IF NOT EXISTS end_reason VARCHAR(20) NULL
		`)
};
