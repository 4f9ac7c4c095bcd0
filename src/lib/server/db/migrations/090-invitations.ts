import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '090-invitations',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS invitations (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				name VARCHAR(120) NOT NULL,
				email VARCHAR(254) NOT NULL,
				role ENUM('installer', 'engineer', 'manager') NOT NULL,
				token_hash CHAR(64) NOT NULL,
				expires_at DATETIME(3) NOT NULL,
				accepted_at DATETIME(3) NULL,
				withdrawn_at DATETIME(3) NULL,
				invited_by BIGINT UNSIGNED NOT NULL,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY invitations_token (token_hash),
				KEY invitations_open (workshop_id, accepted_at, withdrawn_at, email),
				CONSTRAINT invitations_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT invitations_invited_by FOREIGN KEY (invited_by) REFERENCES people (id)
			)
		`)
};
