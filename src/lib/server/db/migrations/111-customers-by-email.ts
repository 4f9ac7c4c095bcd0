import type { Migration } from '../migrate';

/** Whoever asks for a link to sign in is looked for by their address. */
export const migration: Migration = {
	name: '111-customers-by-email',
	up: (run) => run('CREATE INDEX IF NOT EXISTS customers_by_email ON customers (email)')
};
