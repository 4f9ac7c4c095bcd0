import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '026-audit-entries-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS audit_entries_no_delete BEFORE DELETE ON audit_entries
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'The audit trail is append-only'
		`)
};
