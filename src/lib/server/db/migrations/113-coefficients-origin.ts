import type { Migration } from '../migrate';

/** Where each value comes from: published, judgement, or fitted from traces. */
export const migration: Migration = {
	name: '113-coefficients-origin',
	up: (run) =>
		run(`
			ALTER TABLE coefficients
				ADD COLUMN IF NOT EXISTS origin ENUM('published', 'judgement', 'fitted') NOT NULL DEFAULT 'judgement' AFTER unit
		`)
};
