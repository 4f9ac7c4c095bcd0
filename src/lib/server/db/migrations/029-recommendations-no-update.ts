import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '029-recommendations-no-update',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS recommendations_no_update BEFORE UPDATE ON recommendations
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A recommendation is immutable'
		`)
};
