import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '081-own-zones',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS own_zones (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				name VARCHAR(60) NOT NULL,
				position INT UNSIGNED NOT NULL,
				rule VARCHAR(16) NOT NULL,
				from_value DOUBLE NULL,
				to_value DOUBLE NULL,
				place_ids JSON NOT NULL,
				version INT UNSIGNED NOT NULL DEFAULT 0,
				created_at DATETIME(3) NOT NULL,
				updated_at DATETIME(3) NOT NULL,
				UNIQUE KEY own_zones_name (workshop_id, name),
				KEY own_zones_in_order (workshop_id, position, id),
				CONSTRAINT own_zones_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id)
			)
		`)
};
