import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '019-outgoing-mails',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS outgoing_mails (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				sheet_id BIGINT UNSIGNED NULL,
				message_id VARCHAR(120) NOT NULL,
				recipient VARCHAR(254) NOT NULL,
				subject VARCHAR(200) NOT NULL,
				text_body MEDIUMTEXT NOT NULL,
				html_body MEDIUMTEXT NOT NULL,
				state ENUM('waiting', 'sent', 'failed') NOT NULL DEFAULT 'waiting',
				attempts INT UNSIGNED NOT NULL DEFAULT 0,
				next_attempt_at DATETIME(3) NOT NULL,
				last_error VARCHAR(300) NOT NULL DEFAULT '',
				sent_at DATETIME(3) NULL,
				created_at DATETIME(3) NOT NULL,
				UNIQUE KEY outgoing_mails_message (message_id),
				KEY outgoing_mails_due (state, next_attempt_at, id),
				KEY outgoing_mails_by_sheet (sheet_id, id),
				CONSTRAINT outgoing_mails_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT outgoing_mails_sheet FOREIGN KEY (sheet_id) REFERENCES sheets (id)
			)
		`)
};
