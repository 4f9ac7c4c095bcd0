import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '100-erasures',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS erasures (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				customer_id BIGINT UNSIGNED NOT NULL,
				asked_by BIGINT UNSIGNED NULL,
				state ENUM('asked', 'running', 'granted', 'refused') NOT NULL DEFAULT 'asked',
				reason VARCHAR(1000) NOT NULL DEFAULT '',
				decided_by BIGINT UNSIGNED NULL,
				decided_at DATETIME(3) NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				KEY erasures_by_customer (customer_id, state),
				KEY erasures_by_workshop (workshop_id, state, id),
				CONSTRAINT erasures_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT erasures_customer FOREIGN KEY (customer_id) REFERENCES customers (id)
			)
		`)
};
