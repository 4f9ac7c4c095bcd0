import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { OutgoingMail, Person, Session, SignInLink } from '../db/models';
import { sha256 } from '../hash';
import { mailSignInLink } from './mailed-link';
import { hashPassword, passwordMatches } from './passwords';
import { giveBack, spend } from './rate-limit';
import {
	ABSOLUTE_MS,
	IDLE_MS,
	closeSession,
	openSession,
	personOfSession,
	whySessionEnded
} from './sessions';

useTestDatabase();

const ago = (ms: number): Date => new Date(Date.now() - ms);

describe('a session', () => {
	it('knows its person and workshop, and keeps only the hash of its secret', async () => {
		const { engineer } = await makeCrew();
		const secret = await openSession(engineer.id);
		expect(await personOfSession(secret)).toEqual(engineer);
		expect(await Session.findByPk(secret)).toBeNull();
	});

	it.each([
		['was idle for half an hour', { lastSeenAt: ago(IDLE_MS + 1000) }, 'idle'],
		['is eight hours old', { createdAt: ago(ABSOLUTE_MS + 1000) }, 'too-old'],
		['was ended', { revokedAt: new Date() }, 'signed-out']
	])('is over once it %s, and says so', async (_what, change, end) => {
		const { installer } = await makeCrew();
		const secret = await openSession(installer.id);
		await Session.update(change, { where: { id: sha256(secret) }, silent: true });
		expect(await personOfSession(secret)).toBeNull();
		expect(await whySessionEnded(secret)).toBe(end);
	});

	it('is over at sign-out, and when its person has left', async () => {
		const { installer, manager } = await makeCrew();
		const [first, second] = await Promise.all([openSession(installer.id), openSession(manager.id)]);
		await closeSession(first);
		await Person.update({ active: false }, { where: { id: manager.id } });
		expect(await personOfSession(first)).toBeNull();
		expect(await personOfSession(second)).toBeNull();
	});

	it('is nobody’s when the secret is made up', async () => {
		await makeCrew();
		expect(await personOfSession('made up')).toBeNull();
	});
});

describe('a password', () => {
	it('fits its own hash and no other, and never nobody’s', async () => {
		const stored = await hashPassword('tape measure and torch');
		expect(await passwordMatches('tape measure and torch', stored)).toBe(true);
		expect(await passwordMatches('tape measure and lamp', stored)).toBe(false);
		expect(await passwordMatches('nobody has this password, it only takes the time', null)).toBe(false);
		expect(stored).toMatch(/^\$argon2id\$v=19\$m=65536,t=3,p=1\$/);
	});
});

describe('tries', () => {
	it('run out in their window, and a good one costs nothing', async () => {
		const { installer } = await makeCrew();
		const limit = { name: 'test', key: installer.email, points: 2, windowS: 60 };
		await spend(limit);
		await spend(limit);
		await expect(spend(limit)).rejects.toMatchObject({ code: 'too_many_requests' });
		await giveBack(limit);
		await giveBack(limit);
		await expect(spend(limit)).resolves.toBeUndefined();
	});

	it('are counted together when they come together', async () => {
		const { installer } = await makeCrew();
		const limit = { name: 'test', key: `together ${installer.email}`, points: 5, windowS: 60 };
		const tries = await Promise.allSettled(Array.from({ length: 20 }, () => spend(limit)));
		expect(tries.filter(({ status }) => status === 'fulfilled').length).toBeLessThanOrEqual(5);
		expect(tries.filter(({ status }) => status === 'rejected').length).toBeGreaterThanOrEqual(15);
	});
});

describe('a mailed link', () => {
	it('is written for a known address, kept hashed, and lives ten minutes', async () => {
		const { installer } = await makeCrew();
		await mailSignInLink(installer.email, '192.0.2.1');
		const letter = await OutgoingMail.findOne({ where: { recipient: installer.email } });
		const token = /sign-in\/link\/([\w-]+)/.exec(letter?.textBody ?? '')?.[1] ?? '';
		expect(Buffer.from(token, 'base64url')).toHaveLength(16);
		const link = await SignInLink.findOne({ where: { personId: installer.id } });
		expect(link?.tokenHash).not.toContain(token);
		const livesMs = (link?.expiresAt.getTime() ?? 0) - Date.now();
		expect(livesMs).toBeGreaterThan(9 * 60_000);
		expect(livesMs).toBeLessThanOrEqual(10 * 60_000);
	});

	it('is answered the same for an unknown address, and writes nothing', async () => {
		await makeCrew();
		await expect(mailSignInLink('stranger@elsewhere.example', '192.0.2.2')).resolves.toBeUndefined();
		expect(await OutgoingMail.count({ where: { recipient: 'stranger@elsewhere.example' } })).toBe(0);
	});
});
