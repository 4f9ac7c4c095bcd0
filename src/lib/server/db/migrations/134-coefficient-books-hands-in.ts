import type { Migration } from '../migrate';

/** Nor does a book come into force by the hands of who changed a value in it: the audit trail knows who that was. */
export const migration: Migration = {
	name: '134-coefficient-books-hands-in',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER coefficient_books_hands BEFORE UPDATE ON coefficient_books
			FOR EACH ROW FOLLOWS coefficient_books_scope
			IF OLD.state = 'on-trial' AND NEW.state = 'in-force' AND EXISTS (
				SELECT 1 FROM audit_entries
				WHERE workshop_id = OLD.workshop_id AND subject_type = 'book' AND subject_id = OLD.id
					AND action = 'book.changed' AND person_id <=> NEW.in_force_by
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'Who changed a value in a book does not put it in force';
			END IF
		`)
};
