import { QueryTypes, type Sequelize } from 'sequelize';

/** What the database must be set to, so that an acknowledged write survives a power cut and no update is lost. */
const REQUIRED_SETTINGS: { name: string; value: string; because: string }[] = [
	{
		name: 'innodb_flush_log_at_trx_commit',
		value: '1',
		because: 'else a commit can be lost when the machine stops'
	},
	{ name: 'sync_binlog', value: '1', because: 'else the binary log can miss a commit' },
	{ name: 'log_bin', value: 'ON', because: 'the binary log is what a restore replays' },
	{
		name: 'innodb_snapshot_isolation',
		value: 'ON',
		because: 'else two people who save at once can lose one change silently'
	}
];

/** Throws one sentence when the server at hand lacks a durable setting. */
export async function requireDurableSettings(sequelize: Sequelize): Promise<void> {
	const names = REQUIRED_SETTINGS.map((setting) => setting.name);
	const rows = await sequelize.query<{ Variable_name: string; Value: string }>(
		'SHOW GLOBAL VARIABLES WHERE Variable_name IN (:names)',
		{ replacements: { names }, type: QueryTypes.SELECT }
	);
	const actual = new Map(rows.map((row) => [row.Variable_name, row.Value]));
	for (const { name, value, because } of REQUIRED_SETTINGS) {
		if (actual.get(name) !== value) {
			throw new Error(
				`The database has ${name}=${actual.get(name) ?? 'unset'}, Soakline needs ${value}: ${because}.`
			);
		}
	}
}
