import type { Migration } from '../migrate';

/** A customer may take a request back while it waits. */
export const migration: Migration = {
	name: '194-erasures-withdrawn',
	up: (run) =>
		run(`
			ALTER TABLE erasures MODIFY COLUMN state
				ENUM('asked', 'running', 'granted', 'refused', 'withdrawn') NOT NULL DEFAULT 'asked'
		`)
};
