import type { Migration } from '../migrate';

/** Who made a book, from which, and who put it in force; all unknown of the first ones. */
export const migration: Migration = {
	name: '112-coefficient-books-hands',
	up: (run) =>
		run(`
			ALTER TABLE coefficient_books
				ADD COLUMN IF NOT EXISTS from_book_id BIGINT UNSIGNED NULL AFTER note,
				ADD COLUMN IF NOT EXISTS made_by BIGINT UNSIGNED NULL AFTER from_book_id,
				ADD COLUMN IF NOT EXISTS in_force_by BIGINT UNSIGNED NULL AFTER made_by,
				ADD COLUMN IF NOT EXISTS in_force_at DATETIME(3) NULL AFTER in_force_by
		`)
};
