import type { Migration } from '../migrate';

/** Of the battery that was assessed; before this column there was one chemistry. */
export const migration: Migration = {
	name: '051-assessments-chemistry',
	up: (run) =>
		run(`
			ALTER TABLE assessments
				ADD COLUMN IF NOT EXISTS chemistry VARCHAR(40) NOT NULL DEFAULT 'lithium-iron-phosphate' AFTER result
		`)
};
