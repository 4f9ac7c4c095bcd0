import { randomBytes } from 'node:crypto';
import type { SignedInPerson } from '$lib/schemas/people';
import { Person, Session, Workshop } from '../db/models';
import { sha256 } from '../hash';

const MINUTE_MS = 60_000;
export const IDLE_MS = 30 * MINUTE_MS;
export const ABSOLUTE_MS = 8 * 60 * MINUTE_MS;
/** Seen-times are written at most this often, so that reading a page is not a write. */
const TOUCH_EVERY_MS = MINUTE_MS;

/** Opens a session and gives its secret id; the database keeps only the hash. */
export async function openSession(personId: number): Promise<string> {
	const secret = randomBytes(32).toString('base64url');
	const now = new Date();
	await Session.create({ id: sha256(secret), personId, createdAt: now, lastSeenAt: now });
	return secret;
}

export async function closeSession(secret: string): Promise<void> {
	await Session.update({ revokedAt: new Date() }, { where: { id: sha256(secret) } });
}

/** Who a session belongs to, while it lives; null once it is idle, too old, revoked, or its person has left. */
export async function personOfSession(secret: string): Promise<SignedInPerson | null> {
	const session = await Session.findByPk(sha256(secret));
	const now = Date.now();
	if (!session || session.revokedAt) return null;
	if (now - session.createdAt.getTime() > ABSOLUTE_MS) return null;
	if (now - session.lastSeenAt.getTime() > IDLE_MS) return null;
	const person = await Person.findByPk(session.personId);
	if (!person?.active) return null;
	const workshop = await Workshop.findByPk(person.workshopId);
	if (!workshop) return null;
	if (now - session.lastSeenAt.getTime() > TOUCH_EVERY_MS)
		await session.update({ lastSeenAt: new Date(now) });
	const { id, workshopId, customerId, name, email, role } = person;
	return { id, workshopId, workshopName: workshop.name, customerId, name, email, role };
}
