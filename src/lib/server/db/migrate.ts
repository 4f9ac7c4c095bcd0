import { QueryTypes, type Sequelize } from 'sequelize';
import { Umzug } from 'umzug';
import { migrations } from './migrations';

export interface Migration {
	name: string;
	/** One DDL step that may be run again: MariaDB commits DDL by itself, so a half-run step must be repeatable. */
	up: (run: (sql: string) => Promise<unknown>) => Promise<unknown>;
}

const LOCK = 'soakline-migrations';
const LOCK_WAIT_S = 30;

function appliedTable(sequelize: Sequelize) {
	return {
		async logMigration({ name }: { name: string }) {
			await sequelize.query(
				'INSERT IGNORE INTO applied_migrations (name, applied_at) VALUES (:name, UTC_TIMESTAMP(3))',
				{
					replacements: { name }
				}
			);
		},
		async unlogMigration({ name }: { name: string }) {
			await sequelize.query('DELETE FROM applied_migrations WHERE name = :name', { replacements: { name } });
		},
		async executed() {
			await sequelize.query(
				'CREATE TABLE IF NOT EXISTS applied_migrations (name VARCHAR(120) NOT NULL PRIMARY KEY, applied_at DATETIME(3) NOT NULL)'
			);
			const rows = await sequelize.query<{ name: string }>(
				'SELECT name FROM applied_migrations ORDER BY name',
				{
					type: QueryTypes.SELECT
				}
			);
			return rows.map((row) => row.name);
		}
	};
}

/**
 * Brings the tables up to date and says how many steps that took.
 * The lock belongs to one connection, so a transaction pins it while the steps run beside it.
 */
export async function migrate(sequelize: Sequelize): Promise<number> {
	return sequelize.transaction(async (transaction) => {
		const [lock] = await sequelize.query<{ got: number | null }>('SELECT GET_LOCK(:name, :wait) AS got', {
			replacements: { name: LOCK, wait: LOCK_WAIT_S },
			type: QueryTypes.SELECT,
			transaction
		});
		if (lock?.got !== 1) {
			throw new Error(
				`Another process has been changing the tables for ${LOCK_WAIT_S} s: wait for it, then start again.`
			);
		}
		try {
			const umzug = new Umzug({
				migrations: migrations.map(({ name, up }) => ({ name, up: () => up((sql) => sequelize.query(sql)) })),
				storage: appliedTable(sequelize),
				logger: undefined
			});
			return (await umzug.up()).length;
		} finally {
			await sequelize.query('DO RELEASE_LOCK(:name)', { replacements: { name: LOCK }, transaction });
		}
	});
}
