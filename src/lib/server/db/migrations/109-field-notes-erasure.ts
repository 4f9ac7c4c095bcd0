import type { Migration } from '../migrate';

/** Only what names or tells of the person may change, and only while an erasure of that customer runs. */
export const migration: Migration = {
	name: '109-field-notes-erasure',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER field_notes_no_update BEFORE UPDATE ON field_notes
			FOR EACH ROW
			IF NOT (
				NEW.id <=> OLD.id AND NEW.workshop_id <=> OLD.workshop_id
				AND NEW.installation_id <=> OLD.installation_id AND NEW.kind <=> OLD.kind
				AND NEW.noted_on <=> OLD.noted_on AND NEW.finding <=> OLD.finding
				AND NEW.engine_version <=> OLD.engine_version AND NEW.created_by <=> OLD.created_by
				AND NEW.created_at <=> OLD.created_at
				AND EXISTS (
					SELECT 1 FROM erasures JOIN jobs ON jobs.customer_id = erasures.customer_id
					JOIN installations ON installations.job_id = jobs.id
					WHERE installations.id = OLD.installation_id AND erasures.state = 'running'
				)
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A field note is immutable';
			END IF
		`)
};
