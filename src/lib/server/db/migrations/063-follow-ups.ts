import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '063-follow-ups',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS follow_ups (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				installation_id BIGINT UNSIGNED NOT NULL,
				after_months TINYINT UNSIGNED NOT NULL,
				due_on DATE NOT NULL,
				done_on DATE NULL,
				done_by VARCHAR(120) NULL,
				reminded_at DATETIME(3) NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY follow_ups_once (installation_id, after_months),
				KEY follow_ups_due (done_on, reminded_at, due_on),
				KEY follow_ups_by_workshop (workshop_id, done_on, due_on),
				CONSTRAINT follow_ups_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT follow_ups_installation FOREIGN KEY (installation_id) REFERENCES installations (id)
			)
		`)
};
