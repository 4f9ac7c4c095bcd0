import type { Migration } from '../migrate';

/** None is taken out of a book either. */
export const migration: Migration = {
	name: '116-coefficients-stay',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER coefficients_no_delete BEFORE DELETE ON coefficients
			FOR EACH ROW
			IF NOT EXISTS (SELECT 1 FROM coefficient_books WHERE id = OLD.book_id AND state = 'draft') THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A coefficient of a book that is no draft is immutable';
			END IF
		`)
};
