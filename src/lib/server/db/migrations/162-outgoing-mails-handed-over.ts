import type { Migration } from '../migrate';

/** Written before a mail server can have a letter, so that one whose answer was never heard is not sent twice. */
export const migration: Migration = {
	name: '162-outgoing-mails-handed-over',
	up: (run) =>
		run(`
			ALTER TABLE outgoing_mails
				MODIFY COLUMN state ENUM('waiting', 'sent', 'failed', 'unsure') NOT NULL DEFAULT 'waiting',
				ADD COLUMN IF NOT EXISTS handed_over_at DATETIME(3) NULL AFTER last_error
		`)
};
