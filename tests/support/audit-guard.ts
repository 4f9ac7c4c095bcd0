import { QueryTypes } from 'sequelize';
import { connection } from '../../src/lib/server/db/connection';

/** Somebody with the database's own keys: takes a guard of the trail off, does it, and puts it back as it was. */
export async function pastGuard(guards: 'update' | 'delete', statements: readonly string[]): Promise<void> {
	const name = `audit_entries_no_${guards}`;
	const [guard] = await connection().query<{ 'SQL Original Statement': string }>(
		`SHOW CREATE TRIGGER ${name}`,
		{ type: QueryTypes.SELECT }
	);
	await connection().query(`DROP TRIGGER ${name}`);
	try {
		for (const sql of statements) await connection().query(sql);
	} finally {
		await connection().query(guard!['SQL Original Statement']);
	}
}
