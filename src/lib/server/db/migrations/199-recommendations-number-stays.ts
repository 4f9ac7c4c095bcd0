import type { Migration } from '../migrate';

/** The number stays, also while an erasure runs. */
export const migration: Migration = {
	name: '199-recommendations-number-stays',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER recommendations_no_update BEFORE UPDATE ON recommendations
			FOR EACH ROW
			IF NOT (
				NEW.id <=> OLD.id AND NEW.workshop_id <=> OLD.workshop_id AND NEW.job_id <=> OLD.job_id
				AND NEW.assessment_id <=> OLD.assessment_id AND NEW.against_verdict <=> OLD.against_verdict
				AND NEW.against_maker <=> OLD.against_maker AND NEW.number <=> OLD.number
				AND NEW.cautions <=> OLD.cautions
				AND NEW.created_by <=> OLD.created_by AND NEW.created_at <=> OLD.created_at
				AND EXISTS (
					SELECT 1 FROM erasures JOIN jobs ON jobs.customer_id = erasures.customer_id
					WHERE jobs.id = OLD.job_id AND erasures.state = 'running'
				)
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A recommendation is immutable';
			END IF
		`)
};
