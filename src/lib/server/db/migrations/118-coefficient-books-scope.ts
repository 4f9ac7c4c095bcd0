import type { Migration } from '../migrate';

/** A book holds for every vehicle and position, or for an engine layout, a kind of position, or both; of each such scope one is in force. */
export const migration: Migration = {
	name: '118-coefficient-books-scope',
	up: (run) =>
		run(`
			ALTER TABLE coefficient_books
				ADD COLUMN IF NOT EXISTS engine_layout VARCHAR(20) NOT NULL DEFAULT 'any' AFTER note,
				ADD COLUMN IF NOT EXISTS position_kind VARCHAR(30) NOT NULL DEFAULT 'any' AFTER engine_layout,
				DROP KEY IF EXISTS coefficient_books_one_in_force,
				ADD UNIQUE KEY IF NOT EXISTS coefficient_books_in_force (workshop_id, in_force_mark, engine_layout, position_kind)
		`)
};
