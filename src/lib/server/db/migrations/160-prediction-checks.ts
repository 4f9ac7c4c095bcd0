import type { Migration } from '../migrate';

/**
 * One row a measurement, beside what was predicted of it at the time: labels and capacity tests by their note, reported
 * cut-outs by the installation that was watched. Figures are in kelvin, in shares of the capacity, or in days, by kind.
 */
export const migration: Migration = {
	name: '160-prediction-checks',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS prediction_checks (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				kind VARCHAR(10) NOT NULL,
				mount_id BIGINT UNSIGNED NOT NULL,
				installation_id BIGINT UNSIGNED NULL,
				field_note_id BIGINT UNSIGNED NULL,
				assessment_id BIGINT UNSIGNED NOT NULL,
				book_id BIGINT UNSIGNED NOT NULL,
				read_on DATE NOT NULL,
				measured DOUBLE NULL,
				predicted DOUBLE NOT NULL,
				low DOUBLE NOT NULL,
				high DOUBLE NOT NULL,
				error DOUBLE NULL,
				square DOUBLE NULL,
				deviations DOUBLE NOT NULL,
				misfit DOUBLE NOT NULL,
				stand VARCHAR(6) NOT NULL,
				chance DOUBLE NULL,
				observed_days INT UNSIGNED NULL,
				is_looked_at BOOLEAN NULL,
				is_entered_later BOOLEAN NOT NULL,
				left_out VARCHAR(12) NOT NULL DEFAULT '',
				UNIQUE KEY prediction_checks_note (field_note_id),
				KEY prediction_checks_worst (workshop_id, left_out, misfit, id),
				KEY prediction_checks_of_installation (installation_id, kind, read_on),
				CONSTRAINT prediction_checks_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT prediction_checks_mount FOREIGN KEY (mount_id) REFERENCES mounts (id),
				CONSTRAINT prediction_checks_installation FOREIGN KEY (installation_id) REFERENCES installations (id),
				CONSTRAINT prediction_checks_note FOREIGN KEY (field_note_id) REFERENCES field_notes (id),
				CONSTRAINT prediction_checks_assessment FOREIGN KEY (assessment_id) REFERENCES assessments (id),
				CONSTRAINT prediction_checks_book FOREIGN KEY (book_id) REFERENCES coefficient_books (id)
			)
		`)
};
