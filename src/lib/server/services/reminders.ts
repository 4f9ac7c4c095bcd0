import { QueryTypes } from 'sequelize';
import { ERASED } from '$lib/schemas/erasures';
import type { Reminded } from '$lib/schemas/fitting';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../db/connection';
import { Customer, FollowUp, Installation, Job, Vehicle, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { notFound } from '../errors';
import { logger } from '../logger';
import { postLetter } from '../mail/outbox';
import { writeReminder } from '../mail/reminder-letter';
import { allow } from '../policies';
import { addDays, today } from './days';
import { stopUrlOf } from './reminder-stops';

const EVERY_MS = 60 * 60_000;
/** A reminder goes out so long before the date. */
const DAYS_AHEAD = 7;
/** A date that passed longer ago is on the list of the overdue, and nobody's news: a battery may be noted years later. */
const DAYS_BEHIND = 31;
const BATCH = 50;

/** Of a row that two processes look at, one has it and the other goes on: nothing is sent twice. */
const DUE = `
	SELECT id FROM follow_ups
	WHERE done_on IS NULL AND reminded_at IS NULL AND due_on BETWEEN :since AND :until
		AND EXISTS (
			SELECT 1 FROM installations JOIN mounts ON mounts.id = installations.mount_id
			WHERE installations.id = follow_ups.installation_id AND mounts.removed_at IS NULL
		)
	ORDER BY due_on, id LIMIT ${BATCH} FOR UPDATE SKIP LOCKED
`;

/** Whoever stopped them is left in peace; the date stays on the shop's list. */
function sayWhom({ name, email, remindersStoppedAt }: Customer, workshop: Workshop): Reminded {
	if (name === ERASED) return 'erased';
	if (remindersStoppedAt) return 'stopped';
	if (email) return 'customer';
	return workshop.email ? 'workshop' : 'nobody';
}

/** To whom the reminders of a job go. */
export async function findReminded(person: SignedInPerson, jobId: number): Promise<Reminded> {
	const { workshopId } = allow(person, 'jobs.read');
	const job = await Job.findOne({ where: { id: jobId, workshopId } });
	const customer = job && (await Customer.findByPk(job.customerId));
	const workshop = await Workshop.findByPk(workshopId);
	if (!customer || !workshop) throw notFound('job');
	return sayWhom(customer, workshop);
}

async function postReminder(
	followUp: FollowUp,
	transaction: Parameters<typeof postLetter>[1]
): Promise<void> {
	const installation = await Installation.findByPk(followUp.installationId, { transaction });
	const job = await Job.findByPk(installation!.jobId, { transaction });
	const [customer, vehicle, workshop] = await Promise.all([
		Customer.findByPk(job!.customerId, { transaction }),
		Vehicle.findByPk(job!.vehicleId, { transaction }),
		Workshop.findByPk(followUp.workshopId, { transaction })
	]);
	await followUp.update({ remindedAt: new Date() }, { transaction });
	const reminded = sayWhom(customer!, workshop!);
	if (reminded !== 'customer' && reminded !== 'workshop') return;
	const recipient = reminded === 'customer' ? customer!.email : workshop!.email;
	const stopUrl = reminded === 'customer' ? stopUrlOf(customer!.id) : '';
	const about = { followUp, customer: customer!, vehicle: vehicle!, workshop: workshop!, stopUrl };
	const { id: jobId, workshopId } = job!;
	const posted = { kind: 'reminder', workshopId, jobId, recipient, stopUrl } as const;
	await postLetter({ ...writeReminder(about), ...posted, replyTo: workshop!.email }, transaction);
}

/** Puts some of the reminders that are due into the outbox, in one transaction with the notes that they are there. */
async function remindSome(now: string): Promise<number> {
	return inTransaction(async (transaction) => {
		const rows = await connection().query<{ id: number }>(DUE, {
			replacements: { since: addDays(now, -DAYS_BEHIND), until: addDays(now, DAYS_AHEAD) },
			type: QueryTypes.SELECT,
			transaction
		});
		const due = await FollowUp.findAll({ where: { id: rows.map(({ id }) => id) }, transaction });
		for (const followUp of due) await postReminder(followUp, transaction);
		return due.length;
	});
}

/** Puts every reminder that is due into the outbox, once. */
export async function remindDue(now = today()): Promise<void> {
	while ((await remindSome(now)) === BATCH);
}

let timer: NodeJS.Timeout | undefined;

function look(): void {
	remindDue().catch((error: unknown) => logger.error({ err: error }, 'reminders failed'));
}

/** Looks at once, for what came due while nothing ran, and then every hour. */
export function startReminders(): void {
	timer ??= setInterval(look, EVERY_MS);
	look();
}

export function stopReminders(): void {
	clearInterval(timer);
	timer = undefined;
}
