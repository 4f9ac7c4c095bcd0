import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '023-assessments-no-update',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS assessments_no_update BEFORE UPDATE ON assessments
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'An assessment is immutable'
		`)
};
