import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '032-places-weather-file',
	up: (run) =>
		run(`
			ALTER TABLE places
				ADD COLUMN IF NOT EXISTS weather_file JSON NULL AFTER months_source,
				ADD COLUMN IF NOT EXISTS before_weather JSON NULL AFTER weather_file
		`)
};
