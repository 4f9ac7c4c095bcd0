import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '030-recommendations-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS recommendations_no_delete BEFORE DELETE ON recommendations
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A recommendation is immutable'
		`)
};
