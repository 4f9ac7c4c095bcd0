import { Sequelize } from 'sequelize';
import { env } from '../env';

/** Kept on globalThis so that a development reload does not open a second pool. */
const holder = globalThis as { soaklineSequelize?: Sequelize };

export function connection(): Sequelize {
	if (holder.soaklineSequelize) return holder.soaklineSequelize;
	const settings = env();
	holder.soaklineSequelize = new Sequelize({
		dialect: 'mariadb',
		host: settings.DATABASE_HOST,
		port: settings.DATABASE_PORT,
		database: settings.DATABASE_NAME,
		username: settings.DATABASE_USER,
		password: settings.DATABASE_PASSWORD,
		timezone: '+00:00',
		logging: false,
		define: { underscored: true },
		pool: { max: 10, min: 0, acquire: 15_000, idle: 10_000 },
		dialectOptions: {
			supportBigNumbers: false,
			bigIntAsNumber: true,
			checkNumberRange: true,
			insertIdAsNumber: true,
			connectTimeout: 5_000
		}
	});
	return holder.soaklineSequelize;
}

export async function closeConnection(): Promise<void> {
	const open = holder.soaklineSequelize;
	delete holder.soaklineSequelize;
	await open?.close();
}
