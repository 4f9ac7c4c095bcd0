import { UniqueConstraintError, type Transaction } from 'sequelize';
import type { InvitationInput, InvitationRow, InvitationView, SignedInPerson } from '$lib/schemas/people';
import { isCommonPassword } from '../auth/common-passwords';
import { hashPassword } from '../auth/passwords';
import { Invitation, Person, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { AppError, notFound } from '../errors';
import { newToken, tokenHash } from '../hash';
import { writeInvitation } from '../mail/invitation-letter';
import { postLetter } from '../mail/outbox';
import { allow } from '../policies';
import { presentInvitation } from '../presenters/people';
import { record, recordBy } from './audit';
import { holdStaff } from './staff';

const LIVES_HOURS = 72;
const subjectOf = ({ id }: Invitation) => ({ type: 'invitation', id });

/** A new link each time: what the database keeps of it opens nothing. */
function freshLink() {
	const token = newToken();
	return {
		href: `${env().ORIGIN}/sign-in/invitation/${token}`,
		kept: { tokenHash: tokenHash(token), expiresAt: new Date(Date.now() + LIVES_HOURS * 3_600_000) }
	};
}

async function postInvitation(
	invitation: Invitation,
	href: string,
	manager: SignedInPerson,
	transaction: Transaction
): Promise<void> {
	const { workshopId, email } = invitation;
	const { workshopName, name: invitedBy } = manager;
	const letter = writeInvitation({ invitation, invitedBy, workshopName, href, livesHours: LIVES_HOURS });
	await postLetter({ kind: 'invitation', workshopId, recipient: email, ...letter }, transaction);
}

function refuseAddress(message: string): AppError {
	return new AppError('conflict', message, [{ path: 'email', message }]);
}

/**
 * One address signs in once, and has one invitation at a time. That it belongs to somebody of another workshop is not
 * said here: whoever reads its letter is told when they follow the link.
 */
async function requireFreeAddress(
	email: string,
	workshopId: number,
	transaction: Transaction
): Promise<void> {
	const known = await Person.findOne({ where: { email }, transaction });
	if (known?.workshopId === workshopId && known.role !== 'customer') {
		throw refuseAddress(
			known.active
				? `${known.name} signs in with this address already.`
				: `${known.name} had this address and has left: bring them back instead.`
		);
	}
	if (known?.workshopId === workshopId) {
		throw refuseAddress('A customer of yours signs in with this address: use another one.');
	}
	const where = { email, workshopId, acceptedAt: null, withdrawnAt: null };
	if ((await Invitation.count({ where, transaction })) > 0) {
		throw refuseAddress('This address has an invitation already: send that one again, or withdraw it.');
	}
}

/** Asks somebody to join, by a letter with a link that works once. */
export async function invite(manager: SignedInPerson, input: InvitationInput): Promise<InvitationRow> {
	allow(manager, 'people.write');
	const { workshopId } = manager;
	return inTransaction(async (transaction) => {
		await holdStaff(manager, transaction);
		await requireFreeAddress(input.email, workshopId, transaction);
		const { href, kept } = freshLink();
		const invitation = await Invitation.create(
			{ workshopId, invitedBy: manager.id, ...input, ...kept },
			{ transaction }
		);
		await postInvitation(invitation, href, manager, transaction);
		await recordBy(manager, 'person.invited', subjectOf(invitation), transaction, { ...input });
		return presentInvitation(invitation, manager.name, new Date());
	});
}

async function changeInvitation(
	manager: SignedInPerson,
	id: number,
	work: (invitation: Invitation, transaction: Transaction) => Promise<void>
): Promise<InvitationRow> {
	allow(manager, 'people.write');
	return inTransaction(async (transaction) => {
		await holdStaff(manager, transaction);
		const where = { id, workshopId: manager.workshopId };
		const invitation = await Invitation.findOne({ where, lock: true, transaction });
		if (!invitation) throw notFound('invitation');
		if (invitation.acceptedAt) throw new AppError('conflict', `${invitation.name} has joined already.`);
		if (invitation.withdrawnAt) throw new AppError('conflict', 'This invitation was withdrawn.');
		await work(invitation, transaction);
		const inviter = await Person.findByPk(invitation.invitedBy, { transaction });
		return presentInvitation(invitation, inviter?.name ?? '', new Date());
	});
}

/** Sends an invitation once more. The link of the letter before stops working. */
export function inviteAgain(manager: SignedInPerson, invitationId: number): Promise<InvitationRow> {
	return changeInvitation(manager, invitationId, async (invitation, transaction) => {
		const { href, kept } = freshLink();
		await invitation.update(kept, { transaction });
		await postInvitation(invitation, href, manager, transaction);
		await recordBy(manager, 'invitation.sent-again', subjectOf(invitation), transaction);
	});
}

/** Takes an invitation back: its link opens nothing any more. */
export function withdrawInvitation(manager: SignedInPerson, invitationId: number): Promise<InvitationRow> {
	return changeInvitation(manager, invitationId, async (invitation, transaction) => {
		await invitation.update({ withdrawnAt: new Date() }, { transaction });
		await recordBy(manager, 'invitation.withdrawn', subjectOf(invitation), transaction);
	});
}

const OVER = {
	used: 'This invitation has been used. Sign in with the password that you chose.',
	withdrawn: 'The shop withdrew this invitation. Ask it for another one.',
	tooOld: `This invitation is older than ${LIVES_HOURS} hours. Ask the shop to send it again.`
};

/** The invitation behind a link, while it stands. */
async function findOpen(token: string, transaction?: Transaction): Promise<Invitation> {
	const where = { tokenHash: tokenHash(token) };
	const invitation = await Invitation.findOne({
		where,
		...(transaction ? { lock: true, transaction } : {})
	});
	if (!invitation) throw notFound('invitation');
	if (invitation.acceptedAt) throw new AppError('gone', OVER.used);
	if (invitation.withdrawnAt) throw new AppError('gone', OVER.withdrawn);
	if (invitation.expiresAt.getTime() < Date.now()) throw new AppError('gone', OVER.tooOld);
	return invitation;
}

const signsInAlready = (): AppError =>
	new AppError(
		'conflict',
		'This address signs in already, and each address signs in at one shop alone. Ask the shop to invite another one.'
	);

/** What the page of the link says. Looking accepts nothing: programs that scan mail open links too. */
export async function openInvitation(token: string): Promise<InvitationView> {
	const { workshopId, name, email, role } = await findOpen(token);
	if ((await Person.count({ where: { email } })) > 0) throw signsInAlready();
	const workshop = await Workshop.findByPk(workshopId);
	return { workshopName: workshop?.name ?? '', name, email, role };
}

const TOO_COMMON =
	'This password is one of the first that anybody would try. Take a few words that do not belong together.';

/** Invited by two workshops: the one that was accepted first has the address. */
function orSignsInAlready(error: unknown): never {
	if (!(error instanceof UniqueConstraintError)) throw error;
	throw signsInAlready();
}

/** Joins: from now on there is a person with this password. Gives back the address to sign in with. */
export async function acceptInvitation(token: string, password: string): Promise<string> {
	const { name, email, workshopName } = await openInvitation(token);
	if (isCommonPassword(password, [name, email, workshopName])) {
		throw new AppError('invalid_input', TOO_COMMON, [{ path: 'password', message: TOO_COMMON }]);
	}
	const passwordHash = await hashPassword(password);
	return inTransaction(async (transaction) => {
		const invitation = await findOpen(token, transaction);
		const { workshopId, role } = invitation;
		const joining = { workshopId, name, email, role, passwordHash };
		const { id } = await Person.create(joining, { transaction }).catch(orSignsInAlready);
		await invitation.update({ acceptedAt: new Date() }, { transaction });
		const joined = { action: 'person.joined' as const, subjectType: 'person', subjectId: id };
		const detail = { invitationId: invitation.id, role };
		await record({ workshopId, personId: id, ...joined, detail }, transaction);
		return email;
	});
}
