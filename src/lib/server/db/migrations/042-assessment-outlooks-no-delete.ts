import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '042-assessment-outlooks-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS assessment_outlooks_no_delete BEFORE DELETE ON assessment_outlooks
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'The outlook of an assessment is immutable'
		`)
};
