import type { Migration } from '../migrate';

/** A question of the customer stands for itself; an answer of the shop names its question. */
export const migration: Migration = {
	name: '101-customer-messages',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS customer_messages (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				sheet_id BIGINT UNSIGNED NULL,
				question_id BIGINT UNSIGNED NULL,
				person_id BIGINT UNSIGNED NULL,
				author_name VARCHAR(120) NOT NULL,
				body VARCHAR(2000) NOT NULL,
				once_key VARCHAR(80) NULL,
				created_at DATETIME(3) NOT NULL,
				UNIQUE KEY customer_messages_once (once_key),
				KEY customer_messages_by_job (job_id, question_id, id),
				KEY customer_messages_by_question (question_id, id),
				CONSTRAINT customer_messages_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT customer_messages_job FOREIGN KEY (job_id) REFERENCES jobs (id),
				CONSTRAINT customer_messages_sheet FOREIGN KEY (sheet_id) REFERENCES sheets (id),
				CONSTRAINT customer_messages_question FOREIGN KEY (question_id) REFERENCES customer_messages (id)
			)
		`)
};
