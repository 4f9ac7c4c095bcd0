// Fills a workshop of its own with invented installations, in the database that the environment leads to.
import { QueryTypes } from 'sequelize';
import { formatSeconds } from './bench-table';

export interface InventedWorkshop {
	installations: number;
	seed: number;
}

/** Counted where people write to, without anything that the review keeps. */
const COUNT = `
	SELECT COUNT(DISTINCT i.id) AS standing, COUNT(DISTINCT n.installation_id, n.noted_on) AS darkDays
	FROM installations i
		JOIN mounts m ON m.id = i.mount_id AND m.removed_at IS NULL
		LEFT JOIN field_notes n ON n.installation_id = i.id AND n.kind = 'cut-out'
	WHERE i.workshop_id = :workshopId
`;
interface Counted {
	standing: number;
	darkDays: number;
}

/** For trying out alone: whoever runs the program reads it on the screen. */
const PASSWORD = 'invented for trying out';

/** Invents, makes the review, and says who may sign in to look at it. */
export async function inventWorkshop(
	env: NodeJS.ProcessEnv,
	{ installations, seed }: InventedWorkshop,
	say: (words: string) => void
): Promise<{ email: string; password: string; standing: number; darkDays: number }> {
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
		const [counted] = await connection().query<Counted>(COUNT, {
			replacements: { workshopId },
			type: QueryTypes.SELECT
		});
		return {
			email,
			password: PASSWORD,
			standing: Number(counted!.standing),
			darkDays: Number(counted!.darkDays)
		};
	} finally {
		await closeConnection();
	}
}
