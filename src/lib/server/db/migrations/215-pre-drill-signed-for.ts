import type { Migration } from '../migrate';

/** What was asked when a name was put to the check; those from before hold whatever is asked by now. */
export const migration: Migration = {
	name: '215-pre-drill-signed-for',
	up: (run) =>
		run('ALTER TABLE pre_drill_checks ADD COLUMN IF NOT EXISTS signed_for JSON NULL AFTER signed_at')
};
