import type { Migration } from '../migrate';

export const migration: Migration = {
	name: '103-customer-messages-no-delete',
	up: (run) =>
		run(`
			CREATE TRIGGER IF NOT EXISTS customer_messages_no_delete BEFORE DELETE ON customer_messages
			FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A question or an answer is immutable'
		`)
};
