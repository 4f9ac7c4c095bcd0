import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '014-coefficients',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS coefficients (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				book_id BIGINT UNSIGNED NOT NULL,
				field_group VARCHAR(20) NOT NULL,
				field_key VARCHAR(40) NOT NULL,
				value DOUBLE NOT NULL,
				unit VARCHAR(20) NOT NULL,
				source VARCHAR(300) NOT NULL,
				UNIQUE KEY coefficients_field (book_id, field_group, field_key),
				CONSTRAINT coefficients_book FOREIGN KEY (book_id) REFERENCES coefficient_books (id)
			)
		`)
};
