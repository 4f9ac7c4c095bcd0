import { SignInLink } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { newToken, tokenHash } from '../hash';
import { layOutLetter } from '../mail/layout';
import { postLetter } from '../mail/outbox';
import { findAddressee } from './customer-access';
import { spend } from './rate-limit';

const LIVES_MINUTES = 10;
const WINDOW_S = 15 * 60;
/** Longer than writing the letter takes, so that the time of the answer does not tell a known address either. */
const ANSWER_AFTER_MS = 400;

/**
 * Mails a link that signs its reader in, once, within ten minutes. Says nothing about whether the address is known:
 * the answer is the same and takes as long, and the letter is only written down here, to be sent later.
 */
export async function mailSignInLink(email: string, address: string): Promise<void> {
	await spend({ name: 'link account', key: email, points: 5, windowS: WINDOW_S });
	await spend({ name: 'link address', key: address, points: 50, windowS: WINDOW_S });
	const pause = new Promise((resolve) => setTimeout(resolve, ANSWER_AFTER_MS));
	await Promise.all([writeLetter(email), pause]);
}

async function writeLetter(email: string): Promise<void> {
	await inTransaction(async (transaction) => {
		const person = await findAddressee(email, transaction);
		if (!person) return;
		const token = newToken();
		const expiresAt = new Date(Date.now() + LIVES_MINUTES * 60_000);
		await SignInLink.create({ tokenHash: tokenHash(token), personId: person.id, expiresAt }, { transaction });
		const href = `${env().ORIGIN}/sign-in/link/${token}`;
		const letter = layOutLetter({
			subject: 'Your link to sign in to Soakline',
			from: 'Soakline',
			parts: [
				`Hello ${person.name},`,
				`this link signs you in to Soakline. It works once, within ${LIVES_MINUTES} minutes.`,
				{ href, words: 'Sign in to Soakline' },
				'If you did not ask for it, leave it alone: nothing happens.'
			]
		});
		await postLetter(
			{ ...letter, kind: 'sign-in', workshopId: person.workshopId, recipient: person.email },
			transaction
		);
	});
}
