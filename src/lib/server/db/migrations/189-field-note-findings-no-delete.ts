import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '189-field-note-findings-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS field_note_findings_no_delete BEFORE DELETE ON field_note_findings
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A finding is immutable'
		`)
};
