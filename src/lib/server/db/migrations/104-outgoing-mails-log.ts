import type { Migration } from '../migrate';

/** What a letter is about, and of which job: what its sending log and its headers are made from. */
export const migration: Migration = {
	name: '104-outgoing-mails-log',
	up: (run) =>
		run(`
			ALTER TABLE outgoing_mails
				ADD COLUMN IF NOT EXISTS kind VARCHAR(30) NOT NULL DEFAULT 'sheet',
				ADD COLUMN IF NOT EXISTS job_id BIGINT UNSIGNED NULL,
				ADD COLUMN IF NOT EXISTS reply_to VARCHAR(254) NOT NULL DEFAULT '',
				ADD COLUMN IF NOT EXISTS stop_url VARCHAR(300) NOT NULL DEFAULT '',
				ADD KEY IF NOT EXISTS outgoing_mails_by_job (job_id, id)
		`)
};
