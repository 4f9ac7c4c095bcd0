import { env } from './env';
import { closeConnection, connection } from './db/connection';
import { requireDurableSettings } from './db/durability';
import { migrate } from './db/migrate';
import { initModels } from './db/models';
import { logger } from './logger';
import { startOutbox, stopOutbox } from './mail/outbox';
import { clearExpired, startClearing, stopClearing } from './services/clear-expired';
import { seedDemo } from './services/demo/seed-demo';
import { startReminders, stopReminders } from './services/reminders';
import { completeChecks } from './services/accuracy/complete-checks';
import { startHolding, stopHolding } from './services/accuracy/hold-waiting';
import { startReruns, stopReruns } from './services/reruns/run-reruns';
import { completeReviews } from './services/review/keep-review';

/** Kept on globalThis so that a development reload, which loads this module again, does not forget it. */
const state = globalThis as { soaklineReady?: boolean };

export const isReady = (): boolean => state.soaklineReady === true;

async function timed(step: string, work: () => Promise<string>): Promise<void> {
	const start = performance.now();
	const detail = await work();
	logger.info({ step, ms: Math.round(performance.now() - start), detail });
}

/** Notes from before they were held against their predictions; each takes part of a second, and nobody waits for them. */
function holdOldNotes(): void {
	timed('accuracy', async () => {
		const { labels, installations, traces } = await completeChecks();
		return `${labels} labels, ${installations} installations and ${traces} traces held against their predictions`;
	}).catch((error: unknown) => logger.error({ err: error }, 'old notes could not be held against anything'));
}

/** Brings the application up step by step, each said with the time it took; a failure ends the process in one sentence. */
export async function boot(): Promise<void> {
	try {
		const settings = env();
		const sequelize = connection();
		initModels(sequelize);
		await timed('database', async () => {
			await requireDurableSettings(sequelize);
			return 'durable settings hold';
		});
		await timed('migrations', async () => {
			const count = await migrate(sequelize);
			return count === 0 ? 'up to date' : `${count} applied`;
		});
		if (settings.SOAKLINE_DEMO === '1') await timed('demo data', seedDemo);
		await timed('clearing', async () => `${await clearExpired()} rows and files past their time`);
		await timed('review', async () => `${await completeReviews()} made anew`);
		startOutbox();
		startClearing();
		startReminders();
		startReruns();
		startHolding();
		state.soaklineReady = true;
		logger.info({ step: 'ready', ms: 0, detail: settings.ORIGIN });
		holdOldNotes();
	} catch (error) {
		logger.fatal({ fatal: error instanceof Error ? error.message : String(error), err: error });
		process.exit(1);
	}
}

export async function shutDown(): Promise<void> {
	state.soaklineReady = false;
	stopClearing();
	stopReminders();
	await stopReruns();
	await stopHolding();
	await stopOutbox();
	await closeConnection();
}
