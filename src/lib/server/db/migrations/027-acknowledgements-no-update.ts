import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '027-acknowledgements-no-update',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS acknowledgements_no_update BEFORE UPDATE ON acknowledgements
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'An acknowledgement is immutable'
		`)
};
