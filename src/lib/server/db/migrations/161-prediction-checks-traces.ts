import type { Migration } from '../migrate';

/** Whole traces beside what was predicted of their days, and where the battery was measured. */
export const migration: Migration = {
	name: '161-prediction-checks-traces',
	up: (run) =>
		run(`
			ALTER TABLE prediction_checks
				ADD COLUMN IF NOT EXISTS trace_id BIGINT UNSIGNED NULL AFTER field_note_id,
				ADD COLUMN IF NOT EXISTS place VARCHAR(8) NULL AFTER trace_id,
				ADD UNIQUE KEY IF NOT EXISTS prediction_checks_trace (trace_id),
				ADD CONSTRAINT prediction_checks_trace FOREIGN KEY IF NOT EXISTS (trace_id)
					REFERENCES traces (id) ON DELETE CASCADE
		`)
};
