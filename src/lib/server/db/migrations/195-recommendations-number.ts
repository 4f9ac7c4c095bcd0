import type { Migration } from '../migrate';

/** Which one of its job a recommendation is: what people call it by, and tells nobody of other workshops. */
export const migration: Migration = {
	name: '195-recommendations-number',
	up: (run) =>
		run('ALTER TABLE recommendations ADD COLUMN IF NOT EXISTS number INT UNSIGNED NULL AFTER job_id')
};
