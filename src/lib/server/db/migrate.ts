import { QueryTypes, type Sequelize } from 'sequelize';
import { Umzug } from 'umzug';
import { migrations } from './migrations';
import { withNamedLock } from './named-lock';

export interface Migration {
	name: string;
	/** One DDL step that may be run again: MariaDB commits DDL by itself, so a half-run step must be repeatable. */
	up: (run: (sql: string) => Promise<unknown>) => Promise<unknown>;
}

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

/** Brings the tables up to date and says how many steps that took; of several processes one does it. */
export async function migrate(sequelize: Sequelize): Promise<number> {
	return withNamedLock(sequelize, 'tables', async () => {
		const umzug = new Umzug({
			migrations: migrations.map(({ name, up }) => ({ name, up: () => up((sql) => sequelize.query(sql)) })),
			storage: appliedTable(sequelize),
			logger: undefined
		});
		return (await umzug.up()).length;
	});
}
