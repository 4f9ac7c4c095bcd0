import type { Migration } from '../migrate';

/** Only what names or tells of the person may change, and only while an erasure of that customer runs. */
export const migration: Migration = {
	name: '106-acknowledgements-erasure',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER acknowledgements_no_update BEFORE UPDATE ON acknowledgements
			FOR EACH ROW
			IF NOT (
				NEW.id <=> OLD.id AND NEW.sheet_id <=> OLD.sheet_id AND NEW.text_version <=> OLD.text_version
				AND NEW.content_sha256 <=> OLD.content_sha256 AND NEW.created_at <=> OLD.created_at
				AND EXISTS (
					SELECT 1 FROM erasures JOIN jobs ON jobs.customer_id = erasures.customer_id
					JOIN sheets ON sheets.job_id = jobs.id
					WHERE sheets.id = OLD.sheet_id AND erasures.state = 'running'
				)
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'An acknowledgement is immutable';
			END IF
		`)
};
