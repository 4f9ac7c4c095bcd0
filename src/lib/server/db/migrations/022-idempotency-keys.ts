import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '022-idempotency-keys',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS idempotency_keys (
				person_id BIGINT UNSIGNED NOT NULL,
				idempotency_key VARCHAR(120) NOT NULL,
				request_sha256 CHAR(64) NOT NULL,
				status SMALLINT UNSIGNED NULL,
				response LONGTEXT NULL,
				created_at DATETIME(3) NOT NULL,
				PRIMARY KEY (person_id, idempotency_key),
				KEY idempotency_keys_by_age (created_at),
				CONSTRAINT idempotency_keys_person FOREIGN KEY (person_id) REFERENCES people (id)
			)
		`)
};
