import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '003-people',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS people (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				customer_id BIGINT UNSIGNED NULL,
				name VARCHAR(120) NOT NULL,
				email VARCHAR(254) NOT NULL,
				role ENUM('installer', 'engineer', 'manager', 'customer') NOT NULL,
				password_hash VARCHAR(255) NULL,
				active TINYINT(1) NOT NULL DEFAULT 1,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY people_email (email),
				KEY people_by_workshop (workshop_id, role, name),
				CONSTRAINT people_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT people_customer FOREIGN KEY (customer_id) REFERENCES customers (id),
				CONSTRAINT people_customer_role CHECK ((role = 'customer') = (customer_id IS NOT NULL))
			)
		`)
};
