import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '013-coefficient-books',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS coefficient_books (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				number INT UNSIGNED NOT NULL,
				name VARCHAR(80) NOT NULL,
				state ENUM('draft', 'on-trial', 'in-force', 'withdrawn') NOT NULL,
				note VARCHAR(500) NOT NULL DEFAULT '',
				in_force_mark TINYINT(1) AS (IF(state = 'in-force', 1, NULL)) PERSISTENT,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY coefficient_books_number (workshop_id, number),
				UNIQUE KEY coefficient_books_one_in_force (workshop_id, in_force_mark),
				CONSTRAINT coefficient_books_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
