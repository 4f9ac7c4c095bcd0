import type { Migration } from '../migrate';

/** Each day on which a battery of known chance was reported dark, with what the trends filter by. */
export const migration: Migration = {
	name: '084-review-dark-days',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS review_dark_days (
				installation_id BIGINT UNSIGNED NOT NULL,
				dark_on DATE NOT NULL,
				workshop_id BIGINT UNSIGNED NOT NULL,
				place_id BIGINT UNSIGNED NOT NULL,
				verdict VARCHAR(16) NOT NULL,
				fitted_on DATE NOT NULL,
				PRIMARY KEY (installation_id, dark_on),
				KEY review_dark_days_by_day (workshop_id, dark_on, place_id, verdict, fitted_on),
				CONSTRAINT review_dark_days_installation FOREIGN KEY (installation_id) REFERENCES installations (id)
			)
		`)
};
