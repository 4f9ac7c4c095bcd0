import { connection } from '../db/connection';

export async function isDatabaseUp(): Promise<boolean> {
	try {
		await connection().query('SELECT 1');
		return true;
	} catch {
		return false;
	}
}
