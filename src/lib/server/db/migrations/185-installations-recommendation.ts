import type { Migration } from '../migrate';

/** The recommendation that a fitting is held against; one made later may take its place. */
export const migration: Migration = {
	name: '185-installations-recommendation',
	up: (run) =>
		run(`
			ALTER TABLE installations
				ADD COLUMN IF NOT EXISTS recommendation_id BIGINT UNSIGNED NULL AFTER assessment_id,
				ADD KEY IF NOT EXISTS installations_by_recommendation (recommendation_id)
		`)
};
