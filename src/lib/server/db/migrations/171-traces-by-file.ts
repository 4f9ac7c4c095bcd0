import type { Migration } from '../migrate';

/** The traces of one file are looked for, and locked together, each time that one of them is held or changed. */
export const migration: Migration = {
	name: '171-traces-by-file',
	up: (run) => run('ALTER TABLE traces ADD KEY IF NOT EXISTS traces_by_file (workshop_id, sha256)')
};
