import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '033-jobs-days-on-road',
	up: (run) => run('ALTER TABLE jobs ADD COLUMN IF NOT EXISTS days_on_road JSON NULL AFTER sun_peak_w_per_m2')
};
