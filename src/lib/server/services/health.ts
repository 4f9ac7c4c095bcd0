import { connection } from '../db/connection';

export async function isDatabaseUp(): Promise<boolean> {
	try {
		await connection().authenticate();
		return true;
	} catch {
		return false;
	}
}
