import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '065-field-notes-no-update',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS field_notes_no_update BEFORE UPDATE ON field_notes
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A field note is immutable'
		`)
};
