import { randomBytes } from 'node:crypto';
import type { Transaction } from 'sequelize';
import {
	SESSION_IDLE_MINUTES,
	SESSION_MOST_HOURS,
	type SessionEnd,
	type SignedInPerson
} from '$lib/schemas/people';
import { connection } from '../db/connection';
import { Person, Session, SignInLink, SignInStep, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { sha256 } from '../hash';
import { record, type AuditAction } from '../services/audit';

const MINUTE_MS = 60_000;
export const IDLE_MS = SESSION_IDLE_MINUTES * MINUTE_MS;
export const ABSOLUTE_MS = SESSION_MOST_HOURS * 60 * MINUTE_MS;
/** Seen-times are written at most this often, so that reading a page is not a write. */
const TOUCH_EVERY_MS = MINUTE_MS;

/** Opens a session and gives its secret id; the database keeps only the hash. */
export async function openSession(personId: number): Promise<string> {
	const secret = randomBytes(32).toString('base64url');
	const now = new Date();
	await inTransaction(async (transaction) => {
		await Session.create({ id: sha256(secret), personId, createdAt: now, lastSeenAt: now }, { transaction });
		// Not an edit of the person: their version stays, for whoever has them open.
		await connection().query('UPDATE people SET last_signed_in_at = :now WHERE id = :personId', {
			replacements: { now, personId },
			transaction
		});
		await note(personId, 'person.signed-in', transaction);
	});
	return secret;
}

export async function closeSession(secret: string): Promise<void> {
	await inTransaction(async (transaction) => {
		const session = await Session.findByPk(sha256(secret), { transaction });
		if (!session || session.revokedAt) return;
		await session.update({ revokedAt: new Date() }, { transaction });
		await note(session.personId, 'person.signed-out', transaction);
	});
}

/** Ends every session of a person, on any device, from their next request on. */
export async function endSessions(
	personId: number,
	endReason: SessionEnd,
	transaction: Transaction
): Promise<void> {
	await Session.update(
		{ revokedAt: new Date(), endReason },
		{ where: { personId, revokedAt: null }, transaction }
	);
	await SignInLink.destroy({ where: { personId }, transaction });
	await SignInStep.destroy({ where: { personId }, transaction });
}

async function note(personId: number, action: AuditAction, transaction: Transaction): Promise<void> {
	const person = await Person.findByPk(personId, { attributes: ['workshopId'], transaction });
	if (!person) return;
	const { workshopId } = person;
	await record({ workshopId, personId, action, subjectType: 'person', subjectId: personId }, transaction);
}

function endOf(session: Session, now: number): SessionEnd | null {
	if (session.revokedAt) return session.endReason ?? 'signed-out';
	if (now - session.createdAt.getTime() > ABSOLUTE_MS) return 'too-old';
	return now - session.lastSeenAt.getTime() > IDLE_MS ? 'idle' : null;
}

/** Why a session that lets nobody in is over; only who holds its secret is told. Who was brought back has not left. */
export async function whySessionEnded(secret: string): Promise<SessionEnd> {
	const session = await Session.findByPk(sha256(secret));
	const end = (session && endOf(session, Date.now())) ?? 'signed-out';
	if (end !== 'left') return end;
	const person = await Person.findByPk(session!.personId, { attributes: ['active'] });
	return person?.active ? 'signed-out' : 'left';
}

/** Who a session belongs to, while it lives; null once it is idle, too old, revoked, or its person has left. */
export async function personOfSession(secret: string): Promise<SignedInPerson | null> {
	const session = await Session.findByPk(sha256(secret));
	const now = Date.now();
	if (!session || endOf(session, now) !== null) return null;
	const person = await Person.findByPk(session.personId);
	if (!person?.active) return null;
	const workshop = await Workshop.findByPk(person.workshopId);
	if (!workshop) return null;
	if (now - session.lastSeenAt.getTime() > TOUCH_EVERY_MS)
		await session.update({ lastSeenAt: new Date(now) });
	const { id, workshopId, customerId, name, email, role } = person;
	return { id, workshopId, workshopName: workshop.name, customerId, name, email, role };
}
