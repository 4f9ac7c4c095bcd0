import { generate } from 'otplib';
import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { dropSecondFactor, hasSecondFactor, mustSetUpFactor, passSecondFactor } from '../auth/second-factor';
import { passSecondStep } from '../auth/second-step';
import { openSession, personOfSession } from '../auth/sessions';
import {
	AuditEntry,
	OutgoingMail,
	Person,
	RecoveryCode,
	SecondFactor,
	SignInStep,
	Workshop
} from '../db/models';
import { newToken, tokenHash } from '../hash';
import { lockText, unlockText } from '../secret-box';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	beginSetUp,
	confirmSetUp,
	findFactorReach,
	getSecondFactor,
	renewRecoveryCodes,
	resetFactor,
	turnOff
} from './second-factor';

useTestDatabase();

async function keyOf(person: SignedInPerson): Promise<string> {
	const { setUp } = await getSecondFactor(person);
	return setUp!.keyGroups.replaceAll(' ', '');
}

const codeOf = (key: string, stepsOn = 0): Promise<string> =>
	generate({ secret: key, epoch: Math.floor(Date.now() / 1000) + 30 * stepsOn });

/** Set up with the code of the step before, so that the codes of now and next are still good. */
async function turnOn(person: SignedInPerson): Promise<{ key: string; recovery: string[] }> {
	await beginSetUp(person);
	const key = await keyOf(person);
	return { key, recovery: await confirmSetUp(person, await codeOf(key, -1)) };
}

async function firstStep(person: SignedInPerson, expiresAt = new Date(Date.now() + 60_000)): Promise<string> {
	const token = newToken();
	await SignInStep.create({ tokenHash: tokenHash(token), personId: person.id, expiresAt });
	return token;
}

describe('a second factor', () => {
	it('is on once a code has confirmed it, and its key is encrypted where it is kept', async () => {
		const { engineer } = await makeCrew();
		await beginSetUp(engineer);
		const key = await keyOf(engineer);
		expect(await hasSecondFactor(engineer.id)).toBe(false);
		const wrong = confirmSetUp(engineer, '12345');
		await expect(wrong).rejects.toMatchObject({ problems: [{ path: 'code' }] });
		expect(await confirmSetUp(engineer, await codeOf(key))).toHaveLength(10);
		expect(await hasSecondFactor(engineer.id)).toBe(true);
		const row = await SecondFactor.findByPk(engineer.id);
		expect(row!.lockedKey).not.toContain(key);
		expect(() => unlockText('second factor of somebody else', row!.lockedKey)).toThrow();
		expect(await getSecondFactor(engineer)).toMatchObject({ setUp: null, codesLeft: 10 });
	});

	it('takes each code once, and none that is older than one that was used', async () => {
		const { engineer } = await makeCrew();
		const { key } = await turnOn(engineer);
		const [now, next] = [await codeOf(key), await codeOf(key, 1)];
		const together = await Promise.all([1, 2, 3].map(() => passSecondFactor(engineer.id, next)));
		expect(together.filter(Boolean)).toEqual(['by-code']);
		expect(await passSecondFactor(engineer.id, now)).toBeNull();
	});

	it('is asked for by account only so often', async () => {
		const { engineer } = await makeCrew();
		const { key } = await turnOn(engineer);
		for (let wrong = 0; wrong < 5; wrong++) expect(await passSecondFactor(engineer.id, 'xx')).toBeNull();
		const right = passSecondFactor(engineer.id, await codeOf(key));
		await expect(right).rejects.toMatchObject({ code: 'too_many_requests' });
	});

	it('lets its person in without the telephone, once for each recovery code', async () => {
		const { engineer, workshopId } = await makeCrew();
		const { recovery } = await turnOn(engineer);
		const [first = ''] = recovery;
		const person = await passSecondStep(await firstStep(engineer), ` ${first.toUpperCase()} `);
		expect(person?.id).toBe(engineer.id);
		expect(await passSecondStep(await firstStep(engineer), first)).toBeNull();
		expect((await getSecondFactor(engineer)).codesLeft).toBe(9);
		const where = { workshopId, action: 'second-factor.recovery-code-used' };
		expect(await AuditEntry.count({ where })).toBe(1);
	});

	it('keeps recovery codes as hashes, and new ones take the place of the old', async () => {
		const { engineer } = await makeCrew();
		const { key, recovery } = await turnOn(engineer);
		expect(new Set(recovery).size).toBe(10);
		expect(recovery.every((code) => /^[a-z2-9]{5}-[a-z2-9]{5}$/.test(code))).toBe(true);
		const rows = await RecoveryCode.findAll({ where: { personId: engineer.id } });
		expect(rows.some(({ codeHash }) => recovery.includes(codeHash))).toBe(false);
		const renewed = await renewRecoveryCodes(engineer, await codeOf(key));
		expect(await passSecondFactor(engineer.id, recovery[0] ?? '')).toBeNull();
		expect(await passSecondFactor(engineer.id, renewed[0] ?? '')).toBe('by-recovery-code');
	});

	it('completes a first step once, and not one that is too old', async () => {
		const { engineer } = await makeCrew();
		const { key, recovery } = await turnOn(engineer);
		const token = await firstStep(engineer);
		expect((await passSecondStep(token, await codeOf(key)))?.id).toBe(engineer.id);
		await expect(passSecondStep(token, recovery[0] ?? '')).rejects.toMatchObject({ code: 'gone' });
		const old = await firstStep(engineer, new Date(Date.now() - 1));
		await expect(passSecondStep(old, recovery[0] ?? '')).rejects.toMatchObject({ code: 'gone' });
	});

	it('is turned off with a code, and not where the workshop asks for it', async () => {
		const { engineer, workshopId } = await makeCrew();
		const { recovery } = await turnOn(engineer);
		await Workshop.update({ requiresSecondFactor: true }, { where: { id: workshopId } });
		await expect(turnOff(engineer, recovery[0] ?? '')).rejects.toMatchObject({ code: 'conflict' });
		await Workshop.update({ requiresSecondFactor: false }, { where: { id: workshopId } });
		await turnOff(engineer, recovery[0] ?? '');
		expect(await hasSecondFactor(engineer.id)).toBe(false);
	});

	it('is reset by the manager, with a letter, an entry in the trail and the end of the sessions', async () => {
		const { engineer, manager, installer, workshopId } = await makeCrew();
		await turnOn(engineer);
		const secret = await openSession(engineer.id);
		expect(await resetFactor(manager, engineer.id)).toMatchObject({ hasSecondFactor: false });
		expect(await hasSecondFactor(engineer.id)).toBe(false);
		expect(await personOfSession(secret)).toBeNull();
		const letter = await OutgoingMail.findOne({ where: { recipient: engineer.email } });
		expect(letter!.textBody).toContain(`${manager.name} has reset your second factor`);
		expect(await AuditEntry.count({ where: { workshopId, action: 'second-factor.reset' } })).toBe(1);
		await expect(resetFactor(manager, engineer.id)).rejects.toMatchObject({ code: 'conflict' });
		await expect(resetFactor(installer, engineer.id)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(resetFactor((await makeCrew()).manager, engineer.id)).rejects.toMatchObject({
			code: 'not_found'
		});
	});
});

describe('a workshop that asks for one', () => {
	it('asks its manager and engineer until theirs is on, and nobody else', async () => {
		const { engineer, manager, installer, customer, workshopId } = await makeCrew();
		const asked = () => Promise.all([manager, engineer, installer, customer].map(mustSetUpFactor));
		expect(await asked()).toEqual([false, false, false, false]);
		await Workshop.update({ requiresSecondFactor: true }, { where: { id: workshopId } });
		expect(await asked()).toEqual([true, true, false, false]);
		await beginSetUp(engineer);
		expect(await mustSetUpFactor(engineer)).toBe(true);
		await turnOn(engineer);
		expect(await asked()).toEqual([true, false, false, false]);
	});
});

describe('whom a rule would reach', () => {
	it('is every other manager and engineer without one, and the reader is told of their own', async () => {
		const { engineer, manager, installer } = await makeCrew();
		const them = { name: engineer.name, role: 'engineer' };
		expect(await findFactorReach(manager)).toEqual({ isOwnOn: false, others: [them] });
		await beginSetUp(manager);
		expect((await findFactorReach(manager)).isOwnOn).toBe(false);
		await turnOn(manager);
		expect(await findFactorReach(manager)).toEqual({ isOwnOn: true, others: [them] });
		await turnOn(engineer);
		expect((await findFactorReach(manager)).others).toEqual([]);
		await dropSecondFactor(engineer.id);
		await Person.update({ active: false }, { where: { id: engineer.id } });
		expect((await findFactorReach(manager)).others).toEqual([]);
		await expect(findFactorReach(installer)).rejects.toMatchObject({ code: 'not_allowed' });
	});
});

describe('a locked text', () => {
	it('opens for its purpose alone, as it was, and not when a letter of it changed', () => {
		const box = lockText('one', 'the key');
		expect(unlockText('one', box)).toBe('the key');
		expect(lockText('one', 'the key')).not.toBe(box);
		expect(() => unlockText('two', box)).toThrow();
		const changed = box.slice(0, -2) + (box.endsWith('AA') ? 'BB' : 'AA');
		expect(() => unlockText('one', changed)).toThrow();
	});
});
