import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '098-recommendations-cautions',
	up: (run) => run('ALTER TABLE recommendations ADD COLUMN IF NOT EXISTS cautions JSON NULL AFTER pre_drill')
};
