import type { Migration } from '../migrate';

/** One mount of a re-run. It is done in the transaction that keeps its new assessment, so that none is lost or made twice. */
export const migration: Migration = {
	name: '121-rerun-items',
	up: (run) =>
		run(`
			CREATE TABLE IF NOT EXISTS rerun_items (
				id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
				workshop_id BIGINT UNSIGNED NOT NULL,
				rerun_id BIGINT UNSIGNED NOT NULL,
				job_id BIGINT UNSIGNED NOT NULL,
				mount_id BIGINT UNSIGNED NOT NULL,
				assessment_id BIGINT UNSIGNED NOT NULL,
				state ENUM('waiting', 'done', 'passed-over', 'failed') NOT NULL DEFAULT 'waiting',
				reason VARCHAR(500) NOT NULL DEFAULT '',
				new_assessment_id BIGINT UNSIGNED NULL,
				cut_out_share DOUBLE NULL,
				verdict_changed TINYINT(1) NOT NULL DEFAULT 0,
				told_at DATETIME(3) NULL,
				told_by BIGINT UNSIGNED NULL,
				told_how ENUM('letter', 'otherwise') NULL,
				UNIQUE KEY rerun_items_mount (rerun_id, mount_id),
				UNIQUE KEY rerun_items_new (new_assessment_id),
				KEY rerun_items_waiting (rerun_id, state, id),
				KEY rerun_items_changed (rerun_id, verdict_changed, id),
				CONSTRAINT rerun_items_workshop FOREIGN KEY (workshop_id) REFERENCES workshops (id),
				CONSTRAINT rerun_items_rerun FOREIGN KEY (rerun_id) REFERENCES reruns (id),
				CONSTRAINT rerun_items_job FOREIGN KEY (job_id) REFERENCES jobs (id),
				CONSTRAINT rerun_items_mount_of FOREIGN KEY (mount_id) REFERENCES mounts (id),
				CONSTRAINT rerun_items_before FOREIGN KEY (assessment_id) REFERENCES assessments (id),
				CONSTRAINT rerun_items_after FOREIGN KEY (new_assessment_id) REFERENCES assessments (id),
				CONSTRAINT rerun_items_told_by FOREIGN KEY (told_by) REFERENCES people (id)
			)
		`)
};
