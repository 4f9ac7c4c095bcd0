import type { Migration } from '../migrate';

/** Only the reason may change, and only while an erasure of that customer runs. */
export const migration: Migration = {
	name: '151-field-note-strikes-no-update',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER field_note_strikes_no_update BEFORE UPDATE ON field_note_strikes
			FOR EACH ROW
			IF NOT (
				NEW.id <=> OLD.id AND NEW.workshop_id <=> OLD.workshop_id
				AND NEW.field_note_id <=> OLD.field_note_id AND NEW.created_by <=> OLD.created_by
				AND NEW.created_at <=> OLD.created_at
				AND EXISTS (
					SELECT 1 FROM erasures JOIN jobs ON jobs.customer_id = erasures.customer_id
					JOIN installations ON installations.job_id = jobs.id
					JOIN field_notes ON field_notes.installation_id = installations.id
					WHERE field_notes.id = OLD.field_note_id AND erasures.state = 'running'
				)
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A strike is immutable';
			END IF
		`)
};
