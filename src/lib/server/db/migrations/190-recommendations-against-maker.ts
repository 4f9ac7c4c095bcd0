import type { Migration } from '../migrate';

/** Those from before it was asked who decides against the maker's word went against nothing that anybody was told of. */
export const migration: Migration = {
	name: '190-recommendations-against-maker',
	up: (run) =>
		run(
			'ALTER TABLE recommendations ADD COLUMN IF NOT EXISTS against_maker TINYINT(1) NOT NULL DEFAULT 0 AFTER against_verdict'
		)
};
