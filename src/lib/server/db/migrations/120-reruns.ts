import type { Migration } from '../migrate';

/** What a book that came into force, or was withdrawn, lets be assessed again. */
export const migration: Migration = {
	name: '120-reruns',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS reruns (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				book_id BIGINT UNSIGNED NOT NULL,
				occasion ENUM('in-force', 'withdrawn') NOT NULL,
				state ENUM('running', 'cancelled', 'done') NOT NULL DEFAULT 'running',
				begun_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				ended_at DATETIME(3) NULL,
				UNIQUE KEY reruns_once (book_id, occasion),
				KEY reruns_of_workshop (workshop_id, id),
				KEY reruns_by_state (state, id),
				CONSTRAINT reruns_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT reruns_book FOREIGN KEY (book_id) REFERENCES coefficient_books (id),
				CONSTRAINT reruns_begun_by FOREIGN KEY (begun_by) REFERENCES people (id)
			)
		`)
};
