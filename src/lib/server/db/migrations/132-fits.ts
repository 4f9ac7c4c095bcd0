import type { Migration } from '../migrate';

/** Coefficients fitted to traces: what went in, what came out, with which engine. */
export const migration: Migration = {
	name: '132-fits',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS fits (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				name VARCHAR(80) NOT NULL,
				state ENUM('running', 'done', 'failed', 'cancelled') NOT NULL,
				is_synthetic BOOLEAN NOT NULL,
				inputs JSON NOT NULL,
				book_id BIGINT UNSIGNED NOT NULL,
				engine_version VARCHAR(40) NOT NULL,
				result JSON NULL,
				failure VARCHAR(500) NOT NULL DEFAULT '',
				made_by BIGINT UNSIGNED NOT NULL,
				finished_at DATETIME(3) NULL,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				KEY fits_by_workshop (workshop_id, id),
				CONSTRAINT fits_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT fits_book FOREIGN KEY (book_id) REFERENCES coefficient_books (id),
				CONSTRAINT fits_made_by FOREIGN KEY (made_by) REFERENCES people (id)
			)
		`)
};
