import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '061-recommendations-pre-drill',
	up: (run) => run('ALTER TABLE recommendations ADD COLUMN IF NOT EXISTS pre_drill JSON NULL AFTER reason')
};
