import type { Migration } from '../migrate';

/** The same, summed by place, verdict and month of fitting; m01 to m12 and the first month's rest in millionths of a day. */
export const migration: Migration = {
	name: '083-review-months',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS review_months (
				workshop_id BIGINT UNSIGNED NOT NULL,
				place_id BIGINT UNSIGNED NOT NULL,
				verdict VARCHAR(16) NOT NULL,
				fitted_month DATE NOT NULL,
				installations INT NOT NULL,
				known INT NOT NULL,
				never_dark INT NOT NULL,
				first_month BIGINT NOT NULL,
				m01 BIGINT NOT NULL,
				m02 BIGINT NOT NULL,
				m03 BIGINT NOT NULL,
				m04 BIGINT NOT NULL,
				m05 BIGINT NOT NULL,
				m06 BIGINT NOT NULL,
				m07 BIGINT NOT NULL,
				m08 BIGINT NOT NULL,
				m09 BIGINT NOT NULL,
				m10 BIGINT NOT NULL,
				m11 BIGINT NOT NULL,
				m12 BIGINT NOT NULL,
				dark_days INT NOT NULL,
				known_dark_days INT NOT NULL,
				known_not_heat_days INT NOT NULL,
				gone_dark INT NOT NULL,
				overrides INT NOT NULL,
				sheets_waiting INT NOT NULL,
				sheets_missing INT NOT NULL,
				PRIMARY KEY (workshop_id, place_id, verdict, fitted_month)
			)
		`)
};
