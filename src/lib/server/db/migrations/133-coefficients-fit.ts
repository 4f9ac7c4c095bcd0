import type { Migration } from '../migrate';

/** The fit that a fitted value came from. */
export const migration: Migration = {
	name: '133-coefficients-fit',
	up: (run) =>
		run(`
			ALTER TABLE coefficients
				ADD COLUMN IF NOT EXISTS fit_id BIGINT UNSIGNED NULL AFTER origin,
				ADD CONSTRAINT coefficients_fit FOREIGN KEY IF NOT EXISTS (fit_id) REFERENCES fits (id)
		`)
};
