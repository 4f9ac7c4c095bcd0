import type { Migration } from '../migrate';

/**
 * One narrow row a standing installation, with all that the review filters, orders and counts by. What is expected of each
 * month of the year, e01 to e12, is in millionths of a day, so that sums of it are exact.
 */
export const migration: Migration = {
	name: '082-review-rows',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS review_rows (
				installation_id BIGINT UNSIGNED NOT NULL PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				mount_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				place_id BIGINT UNSIGNED NOT NULL,
				zone VARCHAR(3) NOT NULL,
				own_zone_id BIGINT UNSIGNED NOT NULL,
				fitted_on DATE NOT NULL,
				verdict VARCHAR(16) NOT NULL,
				chance VARCHAR(8) NOT NULL,
				e01 INT UNSIGNED NOT NULL,
				e02 INT UNSIGNED NOT NULL,
				e03 INT UNSIGNED NOT NULL,
				e04 INT UNSIGNED NOT NULL,
				e05 INT UNSIGNED NOT NULL,
				e06 INT UNSIGNED NOT NULL,
				e07 INT UNSIGNED NOT NULL,
				e08 INT UNSIGNED NOT NULL,
				e09 INT UNSIGNED NOT NULL,
				e10 INT UNSIGNED NOT NULL,
				e11 INT UNSIGNED NOT NULL,
				e12 INT UNSIGNED NOT NULL,
				dark_days INT UNSIGNED NOT NULL,
				not_heat_days INT UNSIGNED NOT NULL,
				next_due_on DATE NULL,
				against_verdict BOOLEAN NOT NULL,
				recommendation_id BIGINT UNSIGNED NULL,
				sheet_state VARCHAR(12) NOT NULL,
				sheet_id BIGINT UNSIGNED NULL,
				KEY review_rows_in_order (workshop_id, fitted_on, installation_id),
				KEY review_rows_by_zone (workshop_id, zone, fitted_on, installation_id),
				KEY review_rows_by_own_zone (workshop_id, own_zone_id, fitted_on, installation_id),
				KEY review_rows_by_place (workshop_id, place_id, fitted_on, installation_id),
				KEY review_rows_by_verdict (workshop_id, verdict, fitted_on, installation_id),
				KEY review_rows_overridden (workshop_id, against_verdict, fitted_on, installation_id),
				KEY review_rows_by_sheet (workshop_id, sheet_state, fitted_on, installation_id),
				KEY review_rows_gone_dark (workshop_id, dark_days, fitted_on, installation_id),
				KEY review_rows_due (workshop_id, next_due_on, installation_id),
				KEY review_rows_overdue (workshop_id, next_due_on, zone, own_zone_id, place_id, verdict, fitted_on),
				KEY review_rows_of_place (place_id),
				CONSTRAINT review_rows_installation FOREIGN KEY (installation_id) REFERENCES installations (id)
			)
		`)
};
