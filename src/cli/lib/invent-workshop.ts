// Fills a workshop of its own with invented installations, in the database that the environment leads to.
import { formatSeconds } from './bench-table';

export interface InventedWorkshop {
	installations: number;
	seed: number;
}

/** For trying out alone: whoever runs the program reads it on the screen. */
const PASSWORD = 'invented for trying out';

/** Invents, makes the review, and says who may sign in to look at it. */
export async function inventWorkshop(
	env: NodeJS.ProcessEnv,
	{ installations, seed }: InventedWorkshop,
	say: (words: string) => void
): Promise<{ email: string; password: string; workshopId: number }> {
	Object.assign(process.env, env);
	// Only now: what these read of the environment they read when they are loaded or first used.
	const { closeConnection, connection } = await import('../../lib/server/db/connection');
	const { initModels } = await import('../../lib/server/db/models');
	const { hashPassword } = await import('../../lib/server/auth/passwords');
	const { today } = await import('../../lib/server/services/days');
	const { inventInstallations } = await import('../../lib/server/services/review/invent-installations');
	const { rebuildReview } = await import('../../lib/server/services/review/keep-review');
	initModels(connection());
	try {
		const tag = `${installations}-${seed}-${Date.now().toString(36)}`;
		const email = `manager-${tag}@invented.example`;
		const manager = { name: 'Invented manager', email, passwordHash: await hashPassword(PASSWORD) };
		const begun = performance.now();
		const name = `Invented ${tag}`;
		const { workshopId } = await inventInstallations({ installations, seed, today: today(), name, manager });
		const invented = performance.now();
		await rebuildReview(workshopId);
		const made = performance.now();
		say(
			`${installations} installations invented in ${formatSeconds(invented - begun)}, their review made in ${formatSeconds(made - invented)}.`
		);
		return { email, password: PASSWORD, workshopId };
	} finally {
		await closeConnection();
	}
}
