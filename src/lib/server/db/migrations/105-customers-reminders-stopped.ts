import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '105-customers-reminders-stopped',
	up: (run) =>
		run(`ALTER TABLE customers ADD COLUMN IF NOT EXISTS reminders_stopped_at DATETIME(3) NULL AFTER phone`)
};
