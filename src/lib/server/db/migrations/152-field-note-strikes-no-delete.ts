import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '152-field-note-strikes-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS field_note_strikes_no_delete BEFORE DELETE ON field_note_strikes
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A strike is immutable'
		`)
};
