import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '028-acknowledgements-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS acknowledgements_no_delete BEFORE DELETE ON acknowledgements
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'An acknowledgement is immutable'
		`)
};
