import type { Migration } from '../migrate';

/** A book goes its way forwards alone, and into force by a second pair of hands. */
export const migration: Migration = {
	name: '117-coefficient-books-ways',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER coefficient_books_ways BEFORE UPDATE ON coefficient_books
			FOR EACH ROW
			IF NOT (
				NEW.workshop_id <=> OLD.workshop_id AND NEW.number <=> OLD.number
				AND NEW.made_by <=> OLD.made_by AND NEW.from_book_id <=> OLD.from_book_id
				AND (OLD.state = 'draft' OR (NEW.name <=> OLD.name AND NEW.note <=> OLD.note))
				AND (
					NEW.state = OLD.state
					OR (OLD.state = 'draft' AND NEW.state IN ('on-trial', 'withdrawn'))
					OR (
						OLD.state = 'on-trial' AND (
							NEW.state = 'withdrawn'
							OR (NEW.state = 'in-force' AND NOT (NEW.in_force_by <=> OLD.made_by))
						)
					)
					OR (OLD.state = 'in-force' AND NEW.state = 'withdrawn')
				)
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A book that is no draft is immutable';
			END IF
		`)
};
