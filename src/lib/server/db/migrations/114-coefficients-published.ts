import type { Migration } from '../migrate';

/** The values of the first books that a published range stands behind. */
export const migration: Migration = {
	name: '114-coefficients-published',
	up: (run) =>
		run(`
			UPDATE coefficients SET origin = 'published'
			WHERE source NOT LIKE '%judgement%' AND source NOT LIKE '%from memory%'
		`)
};
