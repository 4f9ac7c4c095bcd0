import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '064-field-notes',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS field_notes (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				installation_id BIGINT UNSIGNED NOT NULL,
				kind VARCHAR(20) NOT NULL,
				noted_on DATE NOT NULL,
				data JSON NOT NULL,
				finding JSON NULL,
				engine_version VARCHAR(20) NOT NULL,
				created_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				KEY field_notes_by_installation (installation_id, noted_on, id),
				KEY field_notes_by_kind (workshop_id, kind, noted_on),
				CONSTRAINT field_notes_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT field_notes_installation FOREIGN KEY (installation_id) REFERENCES installations (id),
				CONSTRAINT field_notes_created_by FOREIGN KEY (created_by) REFERENCES people (id)
			)
		`)
};
