import { describe, expect, it } from 'vitest';
import { readTokens } from '../../../../tests/support/invited';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { passwordMatches } from '../auth/passwords';
import { openSession, personOfSession, whySessionEnded } from '../auth/sessions';
import { AuditEntry, Invitation, OutgoingMail, Person } from '../db/models';
import { tokenHash } from '../hash';
import { acceptInvitation, invite, inviteAgain, openInvitation, withdrawInvitation } from './invitations';
import { changeRole, comeBack, leave, listPeople } from './people';

useTestDatabase();

const PASSWORD = 'nine goats on the roof';
const PATH = 'sign-in/invitation';

let asked = 0;

async function ask({ manager }: Crew, role: 'installer' | 'engineer' | 'manager' = 'engineer') {
	const email = `asked-${manager.id}-${asked++}@shop.example`;
	const invitation = await invite(manager, { name: 'Wren Tollgate', email, role });
	const [token = ''] = await readTokens(email, PATH);
	return { invitation, email, token };
}

async function join(crew: Crew, role: 'installer' | 'engineer' | 'manager' = 'engineer'): Promise<Person> {
	const { email, token } = await ask(crew, role);
	await acceptInvitation(token, PASSWORD);
	return (await Person.findOne({ where: { email } }))!;
}

const actionsOf = async ({ workshopId }: Crew): Promise<string[]> =>
	(await AuditEntry.findAll({ where: { workshopId }, order: [['sequence', 'ASC']] })).map(
		({ action }) => action
	);

describe('an invitation', () => {
	it('goes out by letter, is kept hashed, lives 72 hours and makes a person of who accepts it', async () => {
		const crew = await makeCrew();
		const { email, token, invitation } = await ask(crew);
		const row = await Invitation.findByPk(invitation.id);
		expect(row!.tokenHash).toBe(tokenHash(token));
		const livesH = (row!.expiresAt.getTime() - Date.now()) / 3_600_000;
		expect(livesH).toBeGreaterThan(71.9);
		expect(livesH).toBeLessThanOrEqual(72);
		expect(await openInvitation(token)).toEqual({
			...{ workshopName: crew.manager.workshopName, name: 'Wren Tollgate', email, role: 'engineer' }
		});
		expect(await Person.count({ where: { email } })).toBe(0);
		expect(await acceptInvitation(token, PASSWORD)).toBe(email);
		const person = await Person.findOne({ where: { email } });
		expect(person).toMatchObject({ role: 'engineer', active: true, workshopId: crew.workshopId });
		expect(await passwordMatches(PASSWORD, person!.passwordHash)).toBe(true);
		expect(await actionsOf(crew)).toEqual(['person.invited', 'person.joined']);
		expect((await listPeople(crew.manager)).invitations).toEqual([]);
	});

	it('works once, however many press at the same time', async () => {
		const crew = await makeCrew();
		const { email, token } = await ask(crew);
		const pressed = await Promise.allSettled([1, 2, 3].map(() => acceptInvitation(token, PASSWORD)));
		expect(pressed.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
		expect(await Person.count({ where: { email } })).toBe(1);
		await expect(openInvitation(token)).rejects.toMatchObject({ code: 'gone' });
	});

	it('is over when it is withdrawn, or too old', async () => {
		const crew = await makeCrew();
		const [first, second] = [await ask(crew), await ask(crew)];
		await withdrawInvitation(crew.manager, first.invitation.id);
		await Invitation.update({ expiresAt: new Date(Date.now() - 1) }, { where: { id: second.invitation.id } });
		for (const { token } of [first, second]) {
			await expect(openInvitation(token)).rejects.toMatchObject({ code: 'gone' });
			await expect(acceptInvitation(token, PASSWORD)).rejects.toMatchObject({ code: 'gone' });
		}
		const { invitations } = await listPeople(crew.manager);
		expect(invitations).toEqual([expect.objectContaining({ id: second.invitation.id, isTooOld: true })]);
	});

	it('sent again brings a new link, and the one before opens nothing', async () => {
		const crew = await makeCrew();
		const { invitation, email, token } = await ask(crew);
		await inviteAgain(crew.manager, invitation.id);
		const [, newer = ''] = await readTokens(email, PATH);
		await expect(openInvitation(token)).rejects.toMatchObject({ code: 'not_found' });
		expect(await acceptInvitation(newer, PASSWORD)).toBe(email);
		expect(await OutgoingMail.count({ where: { recipient: email } })).toBe(2);
	});

	it('takes no password that anybody would try first', async () => {
		const { token } = await ask(await makeCrew());
		const tried = acceptInvitation(token, 'WrenTollgate2024');
		await expect(tried).rejects.toMatchObject({ problems: [{ path: 'password' }] });
		await expect(acceptInvitation(token, 'passwordpassword')).rejects.toMatchObject({
			code: 'invalid_input'
		});
	});

	it('is for an address that does not sign in here yet, and for each once', async () => {
		const crew = await makeCrew();
		const { email } = await ask(crew);
		const taken = [email, crew.installer.email, crew.customer.email];
		for (const address of taken) {
			const again = invite(crew.manager, { name: 'Again', email: address, role: 'installer' });
			await expect(again).rejects.toMatchObject({ code: 'conflict', problems: [{ path: 'email' }] });
		}
	});

	it('says nothing of somebody of another workshop, and makes no second person of them', async () => {
		const [crew, other] = [await makeCrew(), await makeCrew()];
		const { email } = other.installer;
		const asked = await invite(crew.manager, { name: 'Wren Tollgate', email, role: 'installer' });
		expect(asked).toMatchObject({ email, role: 'installer', isTooOld: false });
		const [token = ''] = await readTokens(email, PATH);
		await expect(openInvitation(token)).rejects.toMatchObject({ code: 'conflict' });
		await expect(acceptInvitation(token, PASSWORD)).rejects.toMatchObject({ code: 'conflict' });
		expect(await Person.findAll({ where: { email } })).toMatchObject([{ workshopId: other.workshopId }]);
	});

	it('of two workshops makes one person, of the one that was accepted first', async () => {
		const [crew, other] = [await makeCrew(), await makeCrew()];
		const { email, token } = await ask(crew);
		await invite(other.manager, { name: 'Wren Tollgate', email, role: 'installer' });
		const [, second = ''] = await readTokens(email, PATH);
		await acceptInvitation(token, PASSWORD);
		await expect(acceptInvitation(second, PASSWORD)).rejects.toMatchObject({ code: 'conflict' });
		expect(await Person.count({ where: { email, workshopId: crew.workshopId } })).toBe(1);
	});

	it('is the manager’s matter, and no other workshop’s', async () => {
		const [crew, other] = [await makeCrew(), await makeCrew()];
		const { invitation } = await ask(crew);
		const input = { name: 'Nobody', email: 'nobody@shop.example', role: 'installer' as const };
		await expect(invite(crew.engineer, input)).rejects.toMatchObject({ code: 'not_allowed' });
		const elsewhere = withdrawInvitation(other.manager, invitation.id);
		await expect(elsewhere).rejects.toMatchObject({ code: 'not_found' });
	});
});

describe('a role', () => {
	it('changes for somebody else, whose sessions end at once', async () => {
		const crew = await makeCrew();
		const secret = await openSession(crew.installer.id);
		const changed = await changeRole(crew.manager, crew.installer.id, { role: 'engineer', version: 0 });
		expect(changed).toMatchObject({ role: 'engineer', version: 1 });
		expect(await personOfSession(secret)).toBeNull();
		expect(await whySessionEnded(secret)).toBe('role-changed');
		const again = await openSession(crew.installer.id);
		expect(await personOfSession(again)).toMatchObject({ role: 'engineer' });
	});

	it('is never one’s own to change, nor that of a version that is old', async () => {
		const crew = await makeCrew();
		const own = changeRole(crew.manager, crew.manager.id, { role: 'installer', version: 0 });
		await expect(own).rejects.toMatchObject({ message: 'Nobody changes their own role.' });
		const old = changeRole(crew.manager, crew.installer.id, { role: 'engineer', version: 7 });
		await expect(old).rejects.toMatchObject({ code: 'changed_meanwhile' });
	});

	it('is not taken from two managers by each other: one of them stays', async () => {
		const crew = await makeCrew();
		const second = await join(crew, 'manager');
		const other = { ...crew.manager, id: second.id, name: second.name, email: second.email };
		const taken = await Promise.allSettled([
			changeRole(crew.manager, second.id, { role: 'installer', version: 0 }),
			changeRole(other, crew.manager.id, { role: 'installer', version: 0 })
		]);
		expect(taken.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
		const where = { workshopId: crew.workshopId, role: 'manager' as const, active: true };
		expect(await Person.count({ where })).toBe(1);
	});

	it('of a customer who signs in is none', async () => {
		const crew = await makeCrew();
		const change = changeRole(crew.manager, crew.customer.id, { role: 'installer', version: 0 });
		await expect(change).rejects.toMatchObject({ code: 'not_found' });
	});
});

describe('somebody who leaves', () => {
	it('is out at once on every device, stays in the list, and can come back', async () => {
		const crew = await makeCrew();
		const secrets = [await openSession(crew.installer.id), await openSession(crew.installer.id)];
		const { version } = await leave(crew.manager, crew.installer.id, 0);
		for (const secret of secrets) expect(await personOfSession(secret)).toBeNull();
		expect(await whySessionEnded(secrets[0]!)).toBe('left');
		const row = (await listPeople(crew.manager)).people.find(({ id }) => id === crew.installer.id);
		expect(row).toMatchObject({ name: crew.installer.name, leftAt: expect.any(String) as string });
		expect(row!.lastSignedInAt).not.toBeNull();
		expect(await comeBack(crew.manager, crew.installer.id, version)).toMatchObject({ leftAt: null });
		for (const secret of secrets) expect(await personOfSession(secret)).toBeNull();
		expect(await whySessionEnded(secrets[0]!)).toBe('signed-out');
		const again = await openSession(crew.installer.id);
		expect(await personOfSession(again)).not.toBeNull();
		expect((await actionsOf(crew)).filter((each) => each !== 'person.signed-in')).toEqual([
			'person.left',
			'person.came-back'
		]);
	});

	it('is not the last manager', async () => {
		const crew = await makeCrew();
		const alone = leave(crew.manager, crew.manager.id, 0);
		await expect(alone).rejects.toMatchObject({ code: 'conflict' });
		await join(crew, 'manager');
		expect(await leave(crew.manager, crew.manager.id, 0)).toMatchObject({ isYou: true });
		const after = changeRole(crew.manager, crew.installer.id, { role: 'engineer', version: 0 });
		await expect(after).rejects.toMatchObject({ code: 'not_allowed' });
	});

	it('is no other workshop’s', async () => {
		const [crew, other] = [await makeCrew(), await makeCrew()];
		await expect(leave(other.manager, crew.installer.id, 0)).rejects.toMatchObject({ code: 'not_found' });
	});
});
