import type { Cookies } from '@sveltejs/kit';
import { Person, SignInStep } from '../db/models';
import { isSecureOrigin } from '../env';
import { AppError } from '../errors';
import { newToken, tokenHash } from '../hash';
import { record } from '../services/audit';
import { inTransaction } from '../db/transaction';
import { passSecondFactor } from './second-factor';

const LIVES_S = 10 * 60;

/** Thrown by the first step of a sign-in that was right: the second factor is asked for next, and nobody is in yet. */
export class SecondStepNeeded extends Error {
	constructor(readonly personId: number) {
		super('The second factor is asked for.');
	}
}

/** Not a longer form of the session's cookie: the sign-in library takes those for parts of that one, and clears them. */
const cookieName = (): string => (isSecureOrigin() ? '__Host-second-step' : 'second-step');

/** Remembers on this device, for ten minutes, whose first step was right. */
export async function beginSecondStep(cookies: Cookies, personId: number): Promise<void> {
	const token = newToken();
	const expiresAt = new Date(Date.now() + LIVES_S * 1000);
	await SignInStep.create({ tokenHash: tokenHash(token), personId, expiresAt });
	const options = { path: '/', httpOnly: true, sameSite: 'lax', secure: isSecureOrigin() } as const;
	cookies.set(cookieName(), token, { ...options, maxAge: LIVES_S });
}

export const readStepToken = (cookies: Cookies): string | undefined => cookies.get(cookieName());

async function noteRecovery({ id, workshopId }: Person): Promise<void> {
	const entry = { workshopId, personId: id, action: 'second-factor.recovery-code-used' } as const;
	await inTransaction((transaction) =>
		record({ ...entry, subjectType: 'person', subjectId: id }, transaction)
	);
}

/** Whose second step a token and a code complete; null when the code is not right. The token works once. */
export async function passSecondStep(token: string, code: string): Promise<Person | null> {
	const hash = tokenHash(token);
	const step = await SignInStep.findByPk(hash);
	if (!step || step.expiresAt.getTime() < Date.now()) {
		throw new AppError('gone', 'That took more than ten minutes. Start at the sign-in page again.');
	}
	const person = await Person.findOne({ where: { id: step.personId, active: true } });
	const passed = person && (await passSecondFactor(person.id, code));
	if (!person || !passed) return null;
	if ((await SignInStep.destroy({ where: { tokenHash: hash } })) !== 1) return null;
	if (passed === 'by-recovery-code') await noteRecovery(person);
	return person;
}
