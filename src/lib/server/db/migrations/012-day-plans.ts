import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '012-day-plans',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS day_plans (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NULL,
				name VARCHAR(80) NOT NULL,
				start_hour DOUBLE NOT NULL,
				start_soc DOUBLE NOT NULL,
				charger_max_a DOUBLE NOT NULL,
				legs JSON NOT NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY day_plans_job (job_id),
				KEY day_plans_by_workshop (workshop_id, job_id, name),
				CONSTRAINT day_plans_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT day_plans_job FOREIGN KEY (job_id) REFERENCES jobs (id)
			)
		`)
};
