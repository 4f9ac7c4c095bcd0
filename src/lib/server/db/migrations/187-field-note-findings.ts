import type { Migration } from '../migrate';

/** What notes say once their battery is held against another assessment; what was found before stays with the note. */
export const migration: Migration = {
	name: '187-field-note-findings',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS field_note_findings (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				field_note_id BIGINT UNSIGNED NOT NULL,
				assessment_id BIGINT UNSIGNED NOT NULL,
				finding JSON NOT NULL,
				engine_version VARCHAR(20) NOT NULL,
				created_at DATETIME(3) NOT NULL,
				KEY field_note_findings_newest (field_note_id, assessment_id, id),
				CONSTRAINT field_note_findings_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT field_note_findings_note FOREIGN KEY (field_note_id) REFERENCES field_notes (id),
				CONSTRAINT field_note_findings_assessment FOREIGN KEY (assessment_id) REFERENCES assessments (id)
			)
		`)
};
