import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '095-workshops-shop',
	up: (run) =>
		run(`
			ALTER TABLE workshops
				ADD COLUMN IF NOT EXISTS business_number VARCHAR(60) NOT NULL DEFAULT '' AFTER email,
				ADD COLUMN IF NOT EXISTS web VARCHAR(200) NOT NULL DEFAULT '' AFTER business_number,
				ADD COLUMN IF NOT EXISTS logo_sha256 CHAR(64) NULL AFTER web,
				ADD COLUMN IF NOT EXISTS requires_second_factor TINYINT(1) NOT NULL DEFAULT 0 AFTER logo_sha256,
				ADD COLUMN IF NOT EXISTS retention_years TINYINT UNSIGNED NULL AFTER requires_second_factor
		`)
};
