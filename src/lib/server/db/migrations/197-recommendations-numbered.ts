import type { Migration } from '../migrate';

/** In the order in which they were made. */
export const migration: Migration = {
	name: '197-recommendations-numbered',
	up: (run) =>
		run(`
			UPDATE recommendations r
			JOIN (
				SELECT id, ROW_NUMBER() OVER (PARTITION BY job_id ORDER BY id) AS place FROM recommendations
			) numbered ON numbered.id = r.id
			SET r.number = numbered.place
			WHERE r.number IS NULL
		`)
};
