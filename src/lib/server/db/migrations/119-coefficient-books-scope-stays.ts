import type { Migration } from '../migrate';

/** What a book holds for is said when it is begun, and never changes: what was assessed with it was chosen by it. */
export const migration: Migration = {
	name: '119-coefficient-books-scope-stays',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER coefficient_books_scope BEFORE UPDATE ON coefficient_books
			FOR EACH ROW FOLLOWS coefficient_books_ways
			IF NOT (NEW.engine_layout <=> OLD.engine_layout AND NEW.position_kind <=> OLD.position_kind) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'What a book holds for is immutable';
			END IF
		`)
};
