import type { Migration } from '../migrate';

/**
 * Traces that are to be held against what had been predicted of their days: a row each time that one is asked for, in the
 * transaction that gives the reason, taken away by the one that keeps what came of it.
 */
export const migration: Migration = {
	name: '170-traces-to-hold',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS traces_to_hold (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				trace_id BIGINT UNSIGNED NOT NULL,
				KEY traces_to_hold_trace (trace_id, id),
				CONSTRAINT traces_to_hold_trace FOREIGN KEY (trace_id) REFERENCES traces (id) ON DELETE CASCADE
			)
		`)
};
