import type { Migration } from '../migrate';

/** Against the verdict or the maker's word: neither without a name and a reason. */
export const migration: Migration = {
	name: '191-recommendations-reasoned',
	up: (run) =>
		run(`
			ALTER TABLE recommendations
				DROP CONSTRAINT IF EXISTS recommendations_reasoned,
				ADD CONSTRAINT recommendations_reasoned CHECK ((against_verdict = 0 AND against_maker = 0)
					OR (COALESCE(LENGTH(decided_by), 0) > 0 AND COALESCE(LENGTH(reason), 0) > 0))
		`)
};
