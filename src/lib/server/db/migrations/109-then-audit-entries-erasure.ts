import type { Migration } from '../migrate';

/** Only what names or tells of the person may change, and only while an erasure of that customer runs. */
export const migration: Migration = {
	name: '109-then-audit-entries-erasure',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER audit_entries_no_update BEFORE UPDATE ON audit_entries
			FOR EACH ROW
			IF NOT (
				NEW.id <=> OLD.id AND NEW.workshop_id <=> OLD.workshop_id AND NEW.sequence <=> OLD.sequence
				AND NEW.at <=> OLD.at AND NEW.person_id <=> OLD.person_id AND NEW.action <=> OLD.action
				AND NEW.subject_type <=> OLD.subject_type AND NEW.subject_id <=> OLD.subject_id
				AND NEW.previous_hash <=> OLD.previous_hash AND NEW.hash <=> OLD.hash
				AND EXISTS (
					SELECT 1 FROM erasures
					WHERE erasures.workshop_id = OLD.workshop_id AND erasures.state = 'running'
						AND JSON_VALUE(NEW.detail, '$.erasure') = erasures.id
				)
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'The audit trail is append-only';
			END IF
		`)
};
