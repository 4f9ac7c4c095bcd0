import type { Migration } from '../migrate';

/** Of the battery that the job's verdict is about; before this column there was one chemistry. */
export const migration: Migration = {
	name: '052-jobs-chemistry',
	up: (run) =>
		run(`
			ALTER TABLE jobs
				ADD COLUMN IF NOT EXISTS assessed_chemistry VARCHAR(40) NOT NULL DEFAULT 'lithium-iron-phosphate' AFTER verdict
		`)
};
