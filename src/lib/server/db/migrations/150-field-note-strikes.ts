import type { Migration } from '../migrate';

/** What was struck out, why, by whom and when. An erasure may make a reason longer than anybody can write it. */
export const migration: Migration = {
	name: '150-field-note-strikes',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS field_note_strikes (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				field_note_id BIGINT UNSIGNED NOT NULL,
				reason VARCHAR(1000) NOT NULL,
				created_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				UNIQUE KEY field_note_strikes_note (field_note_id),
				CONSTRAINT field_note_strikes_reason CHECK (CHAR_LENGTH(reason) >= 5),
				CONSTRAINT field_note_strikes_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT field_note_strikes_note FOREIGN KEY (field_note_id) REFERENCES field_notes (id),
				CONSTRAINT field_note_strikes_created_by FOREIGN KEY (created_by) REFERENCES people (id)
			)
		`)
};
