import type { Migration } from '../migrate';

/** Whom the paper names; those from before it was kept name whom their assessment names. */
export const migration: Migration = {
	name: '192-recommendations-made-out-to',
	up: (run) =>
		run('ALTER TABLE recommendations ADD COLUMN IF NOT EXISTS made_out_to VARCHAR(120) NULL AFTER reason')
};
