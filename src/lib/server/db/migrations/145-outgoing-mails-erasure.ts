import type { Migration } from '../migrate';

/** Which request for deletion a letter answers: whether the customer was told stands with the request. */
export const migration: Migration = {
	name: '145-outgoing-mails-erasure',
	up: (run) =>
		run(`
			ALTER TABLE outgoing_mails
				ADD COLUMN IF NOT EXISTS erasure_id BIGINT UNSIGNED NULL,
				ADD KEY IF NOT EXISTS outgoing_mails_by_erasure (erasure_id)
		`)
};
