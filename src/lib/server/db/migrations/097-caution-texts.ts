import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '097-caution-texts',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS caution_texts (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				number INT UNSIGNED NOT NULL,
				region VARCHAR(40) NOT NULL,
				sentences JSON NOT NULL,
				created_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				UNIQUE KEY caution_texts_number (workshop_id, number),
				CONSTRAINT caution_texts_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT caution_texts_created_by FOREIGN KEY (created_by) REFERENCES people (id)
			)
		`)
};
