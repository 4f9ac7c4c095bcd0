import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '044-mounts-cable',
	up: (run) => run('ALTER TABLE mounts ADD COLUMN IF NOT EXISTS cable JSON NULL AFTER survey_complete')
};
