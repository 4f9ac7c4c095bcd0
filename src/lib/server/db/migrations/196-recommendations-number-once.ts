import type { Migration } from '../migrate';

/** Those from before are given their number, once; nothing else of them changes. */
export const migration: Migration = {
	name: '196-recommendations-number-once',
	up: (run) =>
		run(`
			CREATE OR REPLACE TRIGGER recommendations_no_update BEFORE UPDATE ON recommendations
			FOR EACH ROW
			IF NOT (
				OLD.number IS NULL AND NEW.number IS NOT NULL
				AND NEW.id <=> OLD.id AND NEW.workshop_id <=> OLD.workshop_id AND NEW.job_id <=> OLD.job_id
				AND NEW.assessment_id <=> OLD.assessment_id AND NEW.against_verdict <=> OLD.against_verdict
				AND NEW.against_maker <=> OLD.against_maker AND NEW.decided_by <=> OLD.decided_by
				AND NEW.reason <=> OLD.reason AND NEW.made_out_to <=> OLD.made_out_to
				AND NEW.pre_drill <=> OLD.pre_drill AND NEW.cautions <=> OLD.cautions
				AND NEW.created_by <=> OLD.created_by AND NEW.created_at <=> OLD.created_at
			) THEN
				SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A recommendation is immutable';
			END IF
		`)
};
