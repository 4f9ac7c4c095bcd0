import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '025-audit-entries-no-update',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS audit_entries_no_update BEFORE UPDATE ON audit_entries
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'The audit trail is append-only'
		`)
};
