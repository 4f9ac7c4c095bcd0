import type { Migration } from '../migrate';

/** How a logger writes, as somebody of the workshop confirmed it last. */
export const migration: Migration = {
	name: '131-trace-loggers',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS trace_loggers (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				fingerprint CHAR(16) CHARACTER SET ascii NOT NULL,
				mapping JSON NOT NULL,
				mapped_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY trace_loggers_by_fingerprint (workshop_id, fingerprint),
				CONSTRAINT trace_loggers_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT trace_loggers_mapped_by FOREIGN KEY (mapped_by) REFERENCES people (id)
			)
		`)
};
