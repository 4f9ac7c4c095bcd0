import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '024-assessments-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS assessments_no_delete BEFORE DELETE ON assessments
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'An assessment is immutable'
		`)
};
