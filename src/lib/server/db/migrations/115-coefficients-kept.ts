import type { Migration } from '../migrate';

/** A value changes in a draft alone: what is on trial, in force or withdrawn stays what it was. */
export const migration: Migration = {
	name: '115-coefficients-kept',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER coefficients_no_update BEFORE UPDATE ON coefficients
			FOR EACH ROW
			IF NOT EXISTS (
				SELECT 1 FROM coefficient_books
				WHERE id = OLD.book_id AND id <=> NEW.book_id AND state = 'draft'
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A coefficient of a book that is no draft is immutable';
			END IF
		`)
};
