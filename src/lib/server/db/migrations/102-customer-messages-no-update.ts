import type { Migration } from '../migrate';

/** Only what names or tells of the person may change, and only while an erasure of that customer runs. */
export const migration: Migration = {
	name: '102-customer-messages-no-update',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER customer_messages_no_update BEFORE UPDATE ON customer_messages
			FOR EACH ROW
			IF NOT (
				NEW.id <=> OLD.id AND NEW.workshop_id <=> OLD.workshop_id AND NEW.job_id <=> OLD.job_id
				AND NEW.sheet_id <=> OLD.sheet_id AND NEW.question_id <=> OLD.question_id
				AND NEW.person_id <=> OLD.person_id AND NEW.once_key <=> OLD.once_key
				AND NEW.created_at <=> OLD.created_at
				AND EXISTS (
					SELECT 1 FROM erasures JOIN jobs ON jobs.customer_id = erasures.customer_id
					WHERE jobs.id = OLD.job_id AND erasures.state = 'running'
				)
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A question or an answer is immutable';
			END IF
		`)
};
