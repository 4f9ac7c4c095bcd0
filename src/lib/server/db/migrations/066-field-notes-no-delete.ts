import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '066-field-notes-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS field_notes_no_delete BEFORE DELETE ON field_notes
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A field note is immutable'
		`)
};
