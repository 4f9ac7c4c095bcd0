import type { Migration } from '../migrate';

/** Only the inputs, but never the scenario, may change, with their hash, and only while an erasure of that customer runs. */
export const migration: Migration = {
	name: '108-assessments-erasure',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER assessments_no_update BEFORE UPDATE ON assessments
			FOR EACH ROW
			IF NOT (
				NEW.id <=> OLD.id AND NEW.workshop_id <=> OLD.workshop_id AND NEW.job_id <=> OLD.job_id
				AND NEW.mount_id <=> OLD.mount_id AND NEW.book_id <=> OLD.book_id
				AND NEW.engine_version <=> OLD.engine_version
				AND NEW.result <=> OLD.result AND NEW.chemistry <=> OLD.chemistry AND NEW.verdict <=> OLD.verdict
				AND NEW.headroom_k <=> OLD.headroom_k AND NEW.peak_cells_c <=> OLD.peak_cells_c
				AND NEW.peak_at_hour <=> OLD.peak_at_hour AND NEW.cut_at_hour <=> OLD.cut_at_hour
				AND NEW.reset_at_hour <=> OLD.reset_at_hour AND NEW.dark_hours <=> OLD.dark_hours
				AND NEW.charge_missed_ah <=> OLD.charge_missed_ah
				AND JSON_EXTRACT(NEW.inputs, '$.scenario') <=> JSON_EXTRACT(OLD.inputs, '$.scenario')
				AND NEW.created_by <=> OLD.created_by AND NEW.created_at <=> OLD.created_at
				AND EXISTS (
					SELECT 1 FROM erasures JOIN jobs ON jobs.customer_id = erasures.customer_id
					WHERE jobs.id = OLD.job_id AND erasures.state = 'running'
				)
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'An assessment is immutable';
			END IF
		`)
};
