import type { Migration } from '../migrate';

/** Each job has one recommendation of a number. */
export const migration: Migration = {
	name: '198-recommendations-number-kept',
	up: (run) =>
		run(`
			ALTER TABLE recommendations
				MODIFY COLUMN number INT UNSIGNED NOT NULL,
				ADD UNIQUE KEY IF NOT EXISTS recommendations_by_number (job_id, number)
		`)
};
